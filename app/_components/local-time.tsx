'use client';

import { useSyncExternalStore } from 'react';
import { formatClock, formatDate, formatMoment, formatUtc } from '../_format/times';

interface LocalTimeProps {
  /** ISO 8601, as the API gives it. */
  readonly iso: string;
  /** `clock` drops the date, `date` drops the clock. */
  readonly show?: 'moment' | 'clock' | 'date';
}

const formats = { moment: formatMoment, clock: formatClock, date: formatDate };
const neverChanges = () => () => {};

/**
 * The reader's own time, with UTC on hover. The server does not know the reader's zone, so its first
 * draft is in UTC and the browser puts its own in place.
 */
export function LocalTime({ iso, show = 'moment' }: LocalTimeProps) {
  const inBrowser = useSyncExternalStore(neverChanges, () => true, () => false);
  return (
    <time dateTime={iso} title={formatUtc(iso)}>
      {formats[show](iso, inBrowser ? undefined : 'UTC')}
    </time>
  );
}
