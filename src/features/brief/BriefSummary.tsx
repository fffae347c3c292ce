import type { StudyJson } from '@shared/schemas/study';
import { setPointOf } from '@shared/schemas/setPoint';
import { goalSentence } from '@shared/study/goalSentence';
import { DataTable } from '@/components/DataTable';
import { Panel } from '@/components/Panel';
import { formatPlain, withUnit } from '@/lib/format';

type Brief = NonNullable<StudyJson['brief']>;

/** The Brief as it was frozen. */
export function BriefSummary({ brief }: { readonly brief: Brief }) {
  return (
    <div className="grid gap-4 desk:grid-cols-2 items-start">
      <Panel name="Set-points" isFlush>
        <DataTable
          caption="Varied and held set-points"
          columns={[
            { key: 'name', header: 'Set-point', cell: ({ key }) => setPointOf(key).name },
            {
              key: 'range',
              header: 'Range',
              numeric: true,
              cell: ({ key, low, high }) =>
                withUnit(`${formatPlain(low)} to ${formatPlain(high)}`, setPointOf(key).unit),
            },
            {
              key: 'scale',
              header: 'Coded',
              cell: ({ scale }) => (scale === 'log' ? 'by ratio (log)' : 'evenly'),
            },
          ]}
          rows={brief.factors}
          rowKey={({ key }) => key}
        />
      </Panel>
      <Panel name="Responses and goals" isFlush>
        <DataTable
          caption="Responses and goals"
          columns={[
            { key: 'name', header: 'Response', cell: ({ name }) => name },
            { key: 'goal', header: 'Goal', isWordy: true, cell: goalSentence },
            {
              key: 'kind',
              header: 'How',
              cell: ({ kind }) =>
                kind === 'measured'
                  ? 'measured'
                  : kind === 'passing' || kind === 'size'
                    ? 'from the sieves'
                    : 'computed',
            },
          ]}
          rows={brief.responses}
          rowKey={({ key }) => key}
        />
      </Panel>
    </div>
  );
}
