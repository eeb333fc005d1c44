/**
 * The filters of the call log live in the URL: a filtered list can be shared, and back and forward
 * walk through what was looked at.
 */
export const ranges = { '1h': 'Last hour', '24h': 'Last 24 hours', '7d': 'Last 7 days', '30d': 'Last 30 days', all: 'Any time', own: 'From … to …' } as const;
export type Range = keyof typeof ranges;

export const statuses = { '2xx': 'answered (2xx)', '4xx': 'refused (4xx)', '422': 'wrong input (422)', '429': 'limit or quota (429)', '5xx': 'failed (5xx)' } as const;

export interface CallFilters {
  readonly key: string;
  readonly calculation: string;
  readonly status: string;
  readonly range: Range;
  /** Local time as the browser's control writes it; only with the range `own`. */
  readonly from: string;
  readonly to: string;
}

const hours: Partial<Record<Range, number>> = { '1h': 1, '24h': 24, '7d': 168, '30d': 720 };

export function filtersOf(parameters: URLSearchParams): CallFilters {
  const range = parameters.get('range') ?? 'all';
  return {
    key: parameters.get('key') ?? '',
    calculation: parameters.get('calculation') ?? '',
    status: parameters.get('status') ?? '',
    range: Object.hasOwn(ranges, range) ? (range as Range) : 'all',
    from: parameters.get('from') ?? '',
    to: parameters.get('to') ?? '',
  };
}

/** The shortest query that says the same; a change of filter starts at the newest call again. */
export function queryOf(filters: CallFilters, cursor: string | null = null): string {
  const { range, from, to, ...rest } = filters;
  const parameters = new URLSearchParams(Object.entries({ ...rest, ...(range === 'own' ? { from, to } : {}) }).filter(([, value]) => value !== ''));
  if (range !== 'all') parameters.set('range', range);
  if (cursor) parameters.set('cursor', cursor);
  return parameters.toString();
}

export const rowsOnPage = 50;

/** The API's path for a page of the list. `now` is passed in so that one look keeps one start. */
export function callsPath(filters: CallFilters, cursor: string | null, now: number): string {
  const parameters = new URLSearchParams({ limit: String(rowsOnPage) });
  if (filters.key) parameters.set('key', filters.key);
  if (filters.calculation) parameters.set('calculation', filters.calculation);
  if (filters.status) parameters.set('status', filters.status);
  const span = hours[filters.range];
  if (span !== undefined) parameters.set('from', new Date(now - span * 3_600_000).toISOString());
  if (filters.range === 'own') {
    for (const end of ['from', 'to'] as const) {
      if (!Number.isNaN(Date.parse(filters[end]))) parameters.set(end, new Date(filters[end]).toISOString());
    }
  }
  if (cursor) parameters.set('cursor', cursor);
  return `/calls?${parameters}`;
}
