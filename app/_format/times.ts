/**
 * Times for people: local, in one fixed order of year, month, day, hour, minute, second, so that a
 * column lines up and no reader has to guess which number is the month.
 */
type Zone = string | undefined;

function parts(iso: string, timeZone: Zone): Record<string, string> {
  const format = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    second: '2-digit',
    hourCycle: 'h23',
  });
  return Object.fromEntries(format.formatToParts(new Date(iso)).map(({ type, value }) => [type, value]));
}

/** 2026-12-01 */
export function formatDate(iso: string, timeZone?: Zone): string {
  const { year, month, day } = parts(iso, timeZone);
  return `${year}-${month}-${day}`;
}

/** 14:32:07 */
export function formatClock(iso: string, timeZone?: Zone): string {
  const { hour, minute, second } = parts(iso, timeZone);
  return `${hour}:${minute}:${second}`;
}

/** 2026-12-01 14:32:07 */
export function formatMoment(iso: string, timeZone?: Zone): string {
  return `${formatDate(iso, timeZone)} ${formatClock(iso, timeZone)}`;
}

/** 2026-12-01 13:32:07.120 UTC */
export function formatUtc(iso: string): string {
  return `${new Date(iso).toISOString().replace('T', ' ').replace('Z', '')} UTC`;
}

/** "in 40 s", "in 14 min": how long a refused caller has to wait. */
export function formatWait(seconds: number): string {
  return seconds < 90 ? `${Math.max(1, Math.ceil(seconds))} s` : `${Math.ceil(seconds / 60)} min`;
}
