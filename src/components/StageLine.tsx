import { Link } from 'react-router-dom';
import { classes } from '@/lib/classes';

export interface Station {
  readonly key: string;
  readonly name: string;
  readonly fact?: string;
  /** Where it leads; a station without a page is not a link. */
  readonly to?: string;
  readonly state: 'done' | 'half' | 'now' | 'next';
}

interface StageLineProps {
  readonly stations: readonly Station[];
  /** The station whose page this is. */
  readonly here?: string | undefined;
  readonly isBig?: boolean;
}

/** Stations on one line: walked solid, now lit, to come dashed. On a phone the words stand below. */
export function StageLine({ stations, here, isBig = false }: StageLineProps) {
  const at = stations.findIndex(({ state }) => state === 'now');
  const now = stations[at];
  const isNavigation = stations.some(({ to }) => to !== undefined);
  const Frame = isNavigation ? 'nav' : 'div';
  return (
    <Frame {...(isNavigation ? {} : { role: 'group' })} aria-label="Stages of this study">
      <ol className={classes('stages', isBig && 'big')}>
        {stations.map(({ key, name, fact, to, state }) => (
          <li
            key={key}
            className={classes(state, state === 'half' && 'done', key === here && 'here')}
            aria-current={state === 'now' ? 'step' : undefined}
          >
            <i />
            {to === undefined ? (
              name
            ) : (
              <Link to={to} aria-current={key === here ? 'page' : undefined}>
                {name}
              </Link>
            )}
            {fact !== undefined && <small>{fact}</small>}
          </li>
        ))}
      </ol>
      <div className="stage-word">
        {now
          ? `Stage ${at + 1} of ${stations.length}: ${now.name}`
          : `All ${stations.length} stages are done`}
      </div>
    </Frame>
  );
}
