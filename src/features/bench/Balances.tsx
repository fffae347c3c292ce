import type { BalanceAnswer } from '@shared/schemas/calc/sieve';
import { formatNumber } from '@/lib/format';
import { Notice } from '@/components/Notice';

interface BeamProps {
  readonly name: string;
  readonly words: string;
  readonly balance: BalanceAnswer | null;
  /** Percent at which it warns, and at which the run should be repeated. */
  readonly limits: readonly [number, number];
}

const WIDTH = 480;

const VERDICTS = {
  holds: 'Inside the rule.',
  warn: 'Outside the rule: look for the cause now, while the sample is here.',
  repeat: 'So far outside that the run should be repeated with a reserve bag.',
} as const;

/** One balance as a beam: where the loss lies, and the rule. */
function Beam({ name, words, balance, limits }: BeamProps) {
  const [warn, repeat] = limits;
  const x = (percent: number) =>
    WIDTH / 2 + Math.max(-1, Math.min(1, percent / (1.3 * repeat))) * (WIDTH / 2 - 10);
  return (
    <div className="grid gap-1">
      <div className="flex justify-between text-4">
        <span>{name}</span>
        <span className="mono">
          {balance ? `${formatNumber(-balance.lossG, 2)} g` : 'not weighed'}
        </span>
      </div>
      <svg
        viewBox={`0 0 ${WIDTH} 54`}
        width="100%"
        role="img"
        aria-label={
          balance
            ? `${name}: ${formatNumber(balance.lossPercent, 2)} per cent lost, rule ${warn}`
            : `${name}: not weighed`
        }
      >
        <rect
          x={x(-warn)}
          y="14"
          width={x(warn) - x(-warn)}
          height="14"
          fill="var(--sunk)"
          stroke="var(--ink-2)"
        />
        <path d={`M0 21H${WIDTH}`} className="axis" />
        {[-repeat, -warn, 0, warn, repeat].map((tick) => (
          <g key={tick}>
            <path d={`M${x(tick)} 12V30`} stroke="var(--ink-2)" />
            <text className="ax" x={x(tick)} y="46" textAnchor="middle">
              {tick > 0 ? '+' : tick < 0 ? '−' : ''}
              {Math.abs(tick)}
              {tick === repeat ? ' %' : ''}
            </text>
          </g>
        ))}
        {balance && (
          <path
            d={`M${x(-balance.lossPercent)} 18l-7 -12h14ZM${x(-balance.lossPercent)} 16v14`}
            fill="var(--ink)"
            stroke="var(--ink)"
          />
        )}
      </svg>
      <p className="text-3 text-ink-2">
        {balance ? (
          <>
            <b>
              {formatNumber(Math.abs(balance.lossG), 2)} g {balance.lossG >= 0 ? 'lost' : 'gained'},{' '}
              {formatNumber(Math.abs(balance.lossPercent), 2)} %.
            </b>{' '}
            {VERDICTS[balance.verdict]}
            {balance.lossG < 0 &&
              balance.verdict !== 'holds' &&
              ' A gain: damp, a tare, a wrong row?'}
          </>
        ) : (
          words
        )}
      </p>
    </div>
  );
}

interface BalancesProps {
  readonly treatment: BalanceAnswer | null;
  readonly sieving: BalanceAnswer | null;
  readonly shape: readonly { readonly message: string }[];
}

/** Two balances, never mixed, and what only the shape of the curve can see. */
export function Balances({ treatment, sieving, shape }: BalancesProps) {
  return (
    <div className="grid gap-4" aria-live="polite">
      <Beam
        name="Treatment: feed against product"
        words="Weigh feed and dry product before sieving."
        balance={treatment}
        limits={[1, 2]}
      />
      <Beam
        name="Sieving: product against the sum"
        words="Appears once product and sieves are weighed."
        balance={sieving}
        limits={[0.3, 1]}
      />
      {shape.map(({ message }) => (
        <Notice key={message} tone="caution">
          {message}
        </Notice>
      ))}
    </div>
  );
}
