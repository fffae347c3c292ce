import type { ReleaseJson } from '@shared/schemas/release';
import { Notice } from '@/components/Notice';
import { DataTable } from '@/components/DataTable';
import { Panel } from '@/components/Panel';
import {
  decimalsFor,
  formatDay,
  formatInterval,
  formatMoment,
  formatNumber,
  formatPlain,
} from '@/lib/format';

/** What was signed, as an engineer’s title block under its evidence. */
export function SignedRelease({ release }: { readonly release: ReleaseJson }) {
  const { content, revision, sealShort, isSealIntact } = release;
  const { settings, signedBy, signedAt } = content;
  const cells: { name: string; value: string; isWaiting?: boolean }[] = [
    { name: 'Study', value: `${content.study.code} ${content.study.title}` },
    {
      name: 'Settings',
      value: `${formatPlain(settings.voltage)} kV / ${formatPlain(settings.gap)} mm / ${formatPlain(settings.pulses)} pulses / ${formatPlain(settings.frequency)} Hz`,
    },
    { name: 'Bag', value: `${formatPlain(content.batchMassG)} g, ${content.sample.name}` },
    { name: 'Rig', value: `${content.rig.name}, envelope rev. ${content.rig.revision}` },
    { name: 'Use', value: content.purpose },
    { name: 'Decision rule', value: content.decisionRule },
    { name: 'Fitted', value: [...new Set(content.models.map(({ keptBy }) => keptBy))].join(', ') },
    {
      name: 'Confirmed',
      value: content.confirmation.words,
      isWaiting: content.confirmation.passed !== true,
    },
    { name: 'Released', value: `${signedBy.name}, ${formatMoment(signedAt)}` },
    {
      name: 'Valid until',
      value: content.validUntil ? formatDay(content.validUntil) : 'until withdrawn',
    },
    { name: 'Revision', value: String(revision) },
    { name: 'Data seal', value: sealShort.replace(/(.{4})/g, '$1 ').trim() },
  ];
  return (
    <Panel name={`Release, revision ${revision}`} fact={`“${content.meaning}”`}>
      <div className="grid gap-4">
        {!isSealIntact && (
          <Notice tone="stop" claim="The seal is broken.">
            What is stored is not what was signed. Do not use these settings; call the
            administrator.
          </Notice>
        )}
        {content.isSimulated && (
          <Notice tone="caution" claim="Practice data.">
            Rig and material are invented: no machine is to be set by this.
          </Notice>
        )}
        <DataTable
          caption="What the settings promise"
          columns={[
            { key: 'name', header: 'Response', cell: ({ name }) => name },
            { key: 'goal', header: 'Goal', isWordy: true, cell: ({ goal }) => goal },
            {
              key: 'predicted',
              header: 'Expected',
              numeric: true,
              cell: ({ predicted, unit }) =>
                `${formatNumber(predicted, decimalsFor(predicted))} ${unit}`,
            },
            {
              key: 'interval',
              header: 'One new bag, 95 %',
              numeric: true,
              cell: ({ piLow, piHigh }) =>
                piLow === null ? 'computed' : formatInterval(piLow, piHigh),
            },
          ]}
          rows={content.expectations}
          rowKey={({ key }) => key}
        />
        {content.chanceAllGoals !== null && (
          <p className="reading">
            All goals hold for one new bag in {Math.round(100 * content.chanceAllGoals)} of 100
            {content.chanceError === null ? '' : `, ±${formatNumber(100 * content.chanceError, 1)}`}
            .
          </p>
        )}
        <dl className="signature grid-cols-2 wide:grid-cols-4">
          {cells.map(({ name, value, isWaiting = false }) => (
            <div key={name}>
              <dt>{name}</dt>
              <dd className={isWaiting ? 'waits' : ''}>{value}</dd>
            </div>
          ))}
        </dl>
      </div>
    </Panel>
  );
}
