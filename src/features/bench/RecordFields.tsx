import type { BriefJson } from '@shared/schemas/study';
import { SET_POINTS } from '@shared/schemas/setPoint';
import { Field, TextArea } from '@/components/Field';
import { Panel } from '@/components/Panel';
import type { RunForm, RunProblems } from './runForm';

interface RecordFieldsProps {
  readonly form: RunForm;
  readonly problems: RunProblems;
  readonly brief: BriefJson;
  readonly asksWhy: string | null;
  readonly onChange: (change: Partial<RunForm>) => void;
}

/** What was really delivered, the water, the two weighings, and what is measured by hand. */
export function RecordFields({ form, problems, brief, asksWhy, onChange }: RecordFieldsProps) {
  const measured = brief.responses.filter(({ kind }) => kind === 'measured');
  const number = (
    field:
      | 'misfires'
      | 'conductivityStart'
      | 'conductivityEnd'
      | 'temperature'
      | 'feed'
      | 'beforeSieving',
    label: string,
    unit: string,
    hint?: string,
  ) => (
    <Field
      size="bench"
      label={label}
      unit={unit}
      hint={hint}
      inputMode="decimal"
      value={form[field]}
      error={problems[field]}
      onChange={(event) => onChange({ [field]: event.target.value })}
    />
  );
  return (
    <div className="grid gap-4">
      <Panel name="Masses" fact="dry, in g">
        <div className="grid gap-4 phone:grid-cols-2">
          {number('feed', 'Dry feed', 'g', `planned ${brief.batchMassG} g`)}
          {number('beforeSieving', 'Dry product before sieving', 'g', 'empty: not weighed')}
        </div>
      </Panel>
      <Panel name="Delivered" fact="leave empty what was not read: the set value stands">
        <div className="grid gap-4 grid-cols-2 wide:grid-cols-4">
          {SET_POINTS.map(({ key, name, unit }) => (
            <Field
              key={key}
              size="bench"
              label={`${name} delivered`}
              unit={unit}
              inputMode="decimal"
              value={form.actual[key]}
              error={problems[`actual.${key}`]}
              onChange={(event) =>
                onChange({ actual: { ...form.actual, [key]: event.target.value } })
              }
            />
          ))}
          {number('misfires', 'Misfires', '')}
          {number('conductivityStart', 'Conductivity, start', 'µS/cm')}
          {number('conductivityEnd', 'Conductivity, end', 'µS/cm')}
          {number('temperature', 'Water', '°C')}
        </div>
      </Panel>
      {measured.length > 0 && (
        <Panel name="Measured by hand">
          <div className="grid gap-4 phone:grid-cols-2">
            {measured.map(({ key, name, unit }) => (
              <Field
                key={key}
                size="bench"
                label={name}
                unit={unit}
                inputMode="decimal"
                value={form.measured[key] ?? ''}
                error={problems[`measured.${key}`]}
                onChange={(event) =>
                  onChange({ measured: { ...form.measured, [key]: event.target.value } })
                }
              />
            ))}
          </div>
        </Panel>
      )}
      <TextArea
        label="Remarks"
        value={form.note}
        error={problems['note']}
        onChange={(event) => onChange({ note: event.target.value })}
      />
      {asksWhy !== null && (
        <TextArea
          label="Why?"
          hint={asksWhy}
          value={form.why}
          error={problems['why']}
          onChange={(event) => onChange({ why: event.target.value })}
        />
      )}
    </div>
  );
}
