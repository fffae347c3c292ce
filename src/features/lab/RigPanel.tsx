import { erectedCapacitanceNf, type RigJson } from '@shared/schemas/rig';
import { SET_POINTS } from '@shared/schemas/setPoint';
import { DataTable } from '@/components/DataTable';
import { Panel } from '@/components/Panel';
import { PracticeTag } from '@/components/PracticeTag';
import { formatMoment, formatPlain, withUnit } from '@/lib/format';

/** What a rig can do: a hard fact for every plan and every recommendation. */
export function RigPanel({ rig }: { readonly rig: RigJson }) {
  const { envelope } = rig;
  return (
    <Panel
      name={rig.name}
      fact={`envelope rev. ${rig.revision}, since ${formatMoment(rig.since)}`}
      control={rig.isSimulated && <PracticeTag />}
      isFlush
    >
      <DataTable
        caption={`Settable values of ${rig.name}`}
        columns={[
          { key: 'name', header: 'Set-point', cell: ({ name }) => name },
          {
            key: 'from',
            header: 'From',
            numeric: true,
            cell: ({ key, unit }) => withUnit(formatPlain(envelope[key].min), unit),
          },
          {
            key: 'to',
            header: 'To',
            numeric: true,
            cell: ({ key, unit }) => withUnit(formatPlain(envelope[key].max), unit),
          },
          {
            key: 'step',
            header: 'Step',
            numeric: true,
            cell: ({ key, unit }) => withUnit(formatPlain(envelope[key].step), unit),
          },
        ]}
        rows={SET_POINTS}
        rowKey={({ key }) => key}
      />
      <p className="text-2 text-ink-2 px-4 py-3">
        Erected capacitance {formatPlain(erectedCapacitanceNf(envelope))} nF ({envelope.stages}{' '}
        stages of {formatPlain(envelope.stageCapacitanceNf)} nF), charging power{' '}
        {formatPlain(envelope.chargingPowerW)} W, field {formatPlain(envelope.fieldMinKvPerMm)} to{' '}
        {formatPlain(envelope.fieldMaxKvPerMm)} kV/mm, {formatPlain(envelope.waterL)} L of water.
      </p>
    </Panel>
  );
}
