import type { AuditEventJson } from '@shared/schemas/history';
import { Link } from 'react-router-dom';
import { Panel } from '@/components/Panel';
import { formatMoment } from '@/lib/format';
import { eventWords } from './eventWords';

interface LatelyProps {
  readonly studyId: number;
  readonly events: readonly AuditEventJson[];
}

const MOST = 5;

export function Lately({ studyId, events }: LatelyProps) {
  return (
    <Panel
      name="Lately"
      control={
        <Link className="link text-2" to={`/studies/${studyId}/history`}>
          Whole trail
        </Link>
      }
    >
      <ul className="grid gap-2 text-2">
        {events.slice(0, MOST).map((event) => (
          <li key={event.id} className="grid gap-1">
            <span className="text-ink-3">{formatMoment(event.at)}</span>
            <span>
              <b>{event.by?.name ?? 'Cragline'}</b> {eventWords(event)}
            </span>
          </li>
        ))}
        {events.length === 0 && <li className="text-ink-3">Nothing was changed yet.</li>}
      </ul>
    </Panel>
  );
}
