import type { ImportAnswer } from '@shared/schemas/run';
import { useId, useState, type ChangeEvent } from 'react';
import { Button } from '@/components/Button';
import { DataTable, type Column } from '@/components/DataTable';
import { SelectField } from '@/components/Field';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { formatMass } from '@/lib/format';
import { useImportRuns, type ImportRequest } from '@/queries/runs';

type Row = ImportAnswer['rows'][number];

const MAX_BYTES = 5_000_000;

const columns: readonly Column<Row>[] = [
  { key: 'line', header: 'Line', numeric: true, cell: ({ line }) => line },
  { key: 'run', header: 'Run', numeric: true, cell: ({ runNumber }) => runNumber ?? '—' },
  {
    key: 'feed',
    header: 'Feed',
    numeric: true,
    cell: ({ feedMassG }) => (feedMassG === null ? '—' : formatMass(feedMassG)),
  },
  {
    key: 'sum',
    header: 'On sieves and pan',
    numeric: true,
    cell: ({ recoveredG }) => (recoveredG === null ? '—' : formatMass(recoveredG)),
  },
  {
    key: 'problems',
    header: 'What to look at',
    cell: ({ problems, warnings }) => (
      <ul>
        {problems.map((problem) => (
          <li key={problem} className="text-stop">
            {problem}
          </li>
        ))}
        {warnings.map((warning) => (
          <li key={warning} className="text-caution">
            {warning}
          </li>
        ))}
        {problems.length + warnings.length === 0 && <li className="text-ink-3">reads well</li>}
      </ul>
    ),
  },
];

const SEPARATORS: Readonly<Record<string, string>> = {
  ';': 'semicolons',
  ',': 'commas',
  '\t': 'tabs',
  '|': 'bars',
};

/** One CSV with all runs: read and shown first, saved only when it is accepted. */
export function ImportPanel({ studyId }: { readonly studyId: number }) {
  const importRuns = useImportRuns(studyId);
  const id = useId();
  const [file, setFile] = useState<Pick<ImportRequest, 'csv' | 'fileName'> | null>(null);
  const [decimal, setDecimal] = useState<ImportRequest['decimal']>('auto');
  const [answer, setAnswer] = useState<ImportAnswer | null>(null);
  const [problem, setProblem] = useState<string | null>(null);

  const send = async (request: ImportRequest) => {
    setProblem(null);
    try {
      setAnswer(await importRuns.mutateAsync(request));
    } catch (error) {
      setProblem(error instanceof Error ? error.message : 'The file could not be read.');
    }
  };
  const onFile = async (event: ChangeEvent<HTMLInputElement>) => {
    const chosen = event.target.files?.[0];
    if (!chosen) return;
    setAnswer(null);
    if (chosen.size > MAX_BYTES) {
      setProblem('The file is larger than 5 MB: split it.');
      return;
    }
    const read = { csv: await chosen.text(), fileName: chosen.name };
    setFile(read);
    await send({ ...read, decimal, accept: false });
  };
  const isClean =
    answer !== null &&
    answer.problems.length === 0 &&
    answer.rows.every(({ problems }) => problems.length === 0);
  const unread = answer?.columns.filter(({ meaning }) => meaning === null) ?? [];
  return (
    <Panel name="Import a CSV of runs" fact="semicolons, decimal commas and units are read">
      <div className="grid gap-4">
        <p className="text-2 text-ink-2">
          One line a run: <code>run</code>, <code>feed mass [g]</code>,{' '}
          <code>before sieving [g]</code>, a column for each sieve named by its opening (
          <code>2 mm</code>, <code>125 µm</code>) and <code>pan</code>; if wanted{' '}
          <code>delivered pulses</code>, <code>conductivity end</code>, <code>note</code>, and
          measured responses by their names.
        </p>
        <div className="flex flex-wrap gap-4 items-end">
          <div className="field">
            <label htmlFor={id}>CSV file</label>
            <input
              id={id}
              type="file"
              accept=".csv,.txt,text/csv"
              onChange={(event) => void onFile(event)}
            />
          </div>
          <SelectField
            label="Decimal sign"
            value={decimal}
            options={[
              { value: 'auto', label: 'as the file shows' },
              { value: 'point', label: 'point' },
              { value: 'comma', label: 'comma' },
            ]}
            onChange={(event) => {
              const chosen = event.target.value as ImportRequest['decimal']; // one of the options above
              setDecimal(chosen);
              if (file) void send({ ...file, decimal: chosen, accept: false });
            }}
          />
        </div>
        {problem !== null && <Notice tone="stop">{problem}</Notice>}
        {answer && (
          <>
            <p className="text-2 text-ink-2">
              Read with {SEPARATORS[answer.separator] ?? answer.separator} between cells and a
              decimal {answer.decimal}.
            </p>
            {answer.problems.map((each) => (
              <Notice key={each} tone="stop">
                {each}
              </Notice>
            ))}
            {unread.length > 0 && (
              <Notice tone="caution" claim="Not read:">
                {unread.map(({ heading }) => `‘${heading}’`).join(', ')}. Rename the column or leave
                it out.
              </Notice>
            )}
            <DataTable
              caption="Lines of the file"
              columns={columns}
              rows={answer.rows}
              rowKey={({ line }) => line}
            />
            {answer.accepted ? (
              <Notice claim={`${answer.rows.length} runs are recorded.`} />
            ) : (
              <div>
                <Button
                  look="primary"
                  disabled={!isClean || !file}
                  isBusy={importRuns.isPending}
                  onClick={() => {
                    if (file) void send({ ...file, decimal, accept: true });
                  }}
                >
                  {isClean ? `Record ${answer.rows.length} runs` : 'Mend the file first'}
                </Button>
              </div>
            )}
          </>
        )}
      </div>
    </Panel>
  );
}
