import type { ReactNode } from 'react';
import { RunRing } from '@/components/RunRing';
import { formatPlain } from '@/lib/format';
import { fieldOf } from './field';
import type { MapInput } from './mapInput';

const BAND_FILLS = [
  'bg-map-0',
  'bg-map-1',
  'bg-map-2',
  'bg-map-3',
  'bg-map-4',
  'bg-map-5',
  'bg-map-6',
  'bg-map-7',
  'bg-map-8',
];

/** The nine bands with the values between them. */
function Bands({ map }: { map: MapInput }) {
  const { limits } = fieldOf(map).bands;
  return (
    <div className="w-full text-1 text-ink-3 phone:w-auto" aria-hidden="true">
      <div className="grid grid-cols-9 border border-line-strong">
        {BAND_FILLS.map((fill) => (
          <span key={fill} className={`h-3 phone:w-6 ${fill}`} />
        ))}
      </div>
      <div className="grid grid-cols-9">
        {limits.map((limit) => (
          <span key={limit} className="translate-x-1/2 text-center">
            {formatPlain(limit)}
          </span>
        ))}
      </div>
    </div>
  );
}

/** What the signs on the map mean; below it, never floating inside. */
export function MapLegend({ map }: { map: MapInput }) {
  return (
    <div className="flex flex-wrap items-center gap-x-3 gap-y-1 pt-1 text-1 text-ink-2">
      <Bands map={map} />
      {map.runs.length > 0 && (
        <>
          <Key words="run: on">
            <RunRing residualShare={0} />
          </Key>
          <Key words="above">
            <RunRing residualShare={1.6} />
          </Key>
          <Key words="below the model">
            <RunRing residualShare={-1.6} />
          </Key>
        </>
      )}
      {map.limits.length > 0 && (
        <Key words="not settable">
          <span className="size-4 border border-line-strong bg-surface bg-hatch-infeasible" />
        </Key>
      )}
      {map.support && (
        <Key words="few data">
          <svg viewBox="0 0 16 16" className="size-4">
            <rect width={16} height={16} className="fill-map-5" />
            <rect width={16} height={16} className="fill-veil" fillOpacity={0.6} />
            <path
              d="M4 4h.01M11 7h.01M5 12h.01"
              strokeWidth={2}
              strokeLinecap="round"
              className="stroke-ink"
            />
          </svg>
        </Key>
      )}
      {map.goals.length > 0 && (
        <Key words="goal, teeth inside">
          <svg viewBox="0 0 26 16" className="h-4 w-6">
            <path d="M0 12H26" strokeWidth={1.6} className="stroke-ink" />
            <path d="M3 12l4-6l4 6zM14 12l4-6l4 6z" className="fill-ink" />
          </svg>
        </Key>
      )}
    </div>
  );
}

function Key({ children, words }: { children: ReactNode; words: string }) {
  return (
    <span className="inline-flex items-center gap-2 whitespace-nowrap">
      {children}
      {words}
    </span>
  );
}
