import { MISSING } from './format';

type Moment = string | Date | null | undefined;

const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric' });
const shortDay = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short' });
const clock = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });

function read(moment: Moment): Date | null {
  if (moment === null || moment === undefined) return null;
  const date = new Date(moment);
  return isNaN(date.getTime()) ? null : date;
}

/** “11 March 2026”, in the reader's own time zone. */
export function formatDate(moment: Moment): string {
  const date = read(moment);
  return date ? day.format(date) : MISSING;
}

/** “11 March 2026, 09:31” */
export function formatMoment(moment: Moment): string {
  const date = read(moment);
  return date ? `${day.format(date)}, ${clock.format(date)}` : MISSING;
}

/** “11 Mar 09:31”, for a trail of many. */
export function formatShortMoment(moment: Moment): string {
  const date = read(moment);
  return date ? `${shortDay.format(date)} ${clock.format(date)}` : MISSING;
}

/** “0:30”, “12:06” or “1:02:05” from seconds. */
export function formatClock(seconds: number | null | undefined): string {
  if (typeof seconds !== 'number' || !isFinite(seconds)) return MISSING;
  const whole = Math.max(0, Math.round(seconds));
  const [hours, minutes] = [Math.floor(whole / 3600), Math.floor((whole % 3600) / 60)];
  const rest = String(whole % 60).padStart(2, '0');
  return hours === 0
    ? `${minutes}:${rest}`
    : `${hours}:${String(minutes).padStart(2, '0')}:${rest}`;
}

/** “12 h 06”, or “45 min” below an hour, from minutes. */
export function formatHours(minutes: number | null | undefined): string {
  if (typeof minutes !== 'number' || !isFinite(minutes)) return MISSING;
  const whole = Math.round(minutes);
  if (whole < 60) return `${whole}\u202Fmin`;
  return `${Math.floor(whole / 60)}\u202Fh\u202F${String(whole % 60).padStart(2, '0')}`;
}
