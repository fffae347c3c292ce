import { classes } from '@/lib/classes';
import { formatMass } from '@/lib/format';

export interface LedgerPart {
  readonly kind: 'used' | 'lost' | 'reserved' | 'left';
  /** “Used: 22 runs, 2 head bags” */
  readonly label: string;
  readonly massG: number;
}

const FILLS: Record<LedgerPart['kind'], string> = {
  used: 'bg-ink-2',
  lost: 'bg-hatch-lost',
  reserved: 'bg-hatch-reserved',
  left: 'bg-surface',
};

interface LedgerBarProps {
  readonly parts: readonly LedgerPart[];
  /** “Received 2 March” and how much: the bar's full length. */
  readonly total: { readonly label: string; readonly massG: number };
}

/** Where the sample went. Used solid, lost cross-hatched, reserved hatched, left blank; the same keys below. */
export function LedgerBar({ parts, total }: LedgerBarProps) {
  const shown = parts.filter(({ massG }) => massG > 0);
  const whole = Math.max(
    total.massG,
    shown.reduce((sum, { massG }) => sum + massG, 0),
  );
  return (
    <div>
      <div aria-hidden="true" className="mb-2 flex h-5 border border-ink bg-surface">
        {shown.map(({ kind, label, massG }) => (
          <span
            key={label}
            className={classes('border-l border-ink first:border-l-0', FILLS[kind])}
            style={{ width: `${((100 * massG) / whole).toFixed(2)}%` }}
          />
        ))}
      </div>
      <table className="w-full border-collapse text-2">
        <tbody>
          {parts.map(({ kind, label, massG }) => (
            <tr key={label} className="border-b border-line">
              <th scope="row" className="py-1.5 text-left font-body">
                <span
                  className={classes('mr-2 inline-block h-3 w-3.5 border border-ink', FILLS[kind])}
                />
                {label}
              </th>
              <td className={classes('text-right', kind === 'left' && 'font-head')}>
                {formatMass(massG)}
              </td>
            </tr>
          ))}
          <tr className="text-ink-3">
            <th scope="row" className="py-1.5 text-left font-body">
              {total.label}
            </th>
            <td className="text-right">{formatMass(total.massG)}</td>
          </tr>
        </tbody>
      </table>
    </div>
  );
}
