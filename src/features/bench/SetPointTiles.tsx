import { erectedCapacitanceNf, type EnvelopeJson } from '@shared/schemas/rig';
import { SET_POINTS, type SettingJson } from '@shared/schemas/setPoint';
import { energyAnswer } from '@shared/calc/energy';
import { formatDuration, formatNumber, formatPlain, withUnit } from '@/lib/format';

interface SetPointTilesProps {
  readonly settings: SettingJson;
  /** Of the run before: a change is flagged. */
  readonly before: SettingJson | null;
  readonly envelope: EnvelopeJson;
  readonly massG: number;
}

const decimalsOf = (value: number) => (String(value).split('.')[1] ?? '').length;

/** The four figures to dial in, and what changed since the run before. */
export function SetPointTiles({ settings, before, envelope, massG }: SetPointTilesProps) {
  const energy = energyAnswer({
    capacitanceNf: erectedCapacitanceNf(envelope),
    voltageKv: settings.voltage,
    pulses: settings.pulses,
    frequencyHz: settings.frequency,
    gapMm: settings.gap,
    massG,
    chargingPowerW: envelope.chargingPowerW,
  });
  return (
    <section className="tiles" aria-label="Set-points of this run">
      {SET_POINTS.map(({ key, name, unit }) => {
        const was = before?.[key];
        const now = settings[key];
        return (
          <div key={key} className="tile">
            <div className="name">
              <span>{name}</span>
              {was === undefined ? null : was === now ? (
                <span className="same">as before</span>
              ) : (
                <span className="change">
                  {now > was ? '↑' : '↓'} from {formatPlain(was)}
                </span>
              )}
            </div>
            <div className="value mono">
              {formatNumber(now, Math.max(decimalsOf(envelope[key].step), decimalsOf(now)))}
              {unit !== '' && <span className="unit">{unit}</span>}
            </div>
          </div>
        );
      })}
      <dl className="row">
        <div>
          <dt className="text-2 text-ink-3">Field</dt>
          <dd className="mono text-5">{withUnit(formatNumber(energy.fieldKvPerMm, 2), 'kV/mm')}</dd>
        </div>
        <div>
          <dt className="text-2 text-ink-3">Energy</dt>
          <dd className="mono text-5">
            {withUnit(formatNumber(energy.totalEnergyJ / 1000, 1), 'kJ')}
          </dd>
        </div>
        <div>
          <dt className="text-2 text-ink-3">Specific energy</dt>
          <dd className="mono text-5">
            {withUnit(formatNumber(energy.specificEnergyKwhPerT, 1), 'kWh/t')}
          </dd>
        </div>
        <div>
          <dt className="text-2 text-ink-3">Pulses take</dt>
          <dd className="mono text-5">{formatDuration(energy.achievableDurationS)}</dd>
        </div>
      </dl>
    </section>
  );
}
