/** A request that is answered with a problem; thrown or carried along, turned into an answer in one place. */
import { isDatabaseAway } from '@/db/connection';
import type { FieldError } from '@/lib/problems/field-errors';
import { problemKind, type ProblemSlug } from '@/lib/problems/problems';

interface RefusalOptions {
  readonly errors?: readonly FieldError[];
  readonly headers?: Readonly<Record<string, string>>;
  readonly members?: Readonly<Record<string, unknown>>;
}

export class Refusal extends Error {
  override readonly name = 'Refusal';
  readonly errors: readonly FieldError[];
  readonly headers: Readonly<Record<string, string>>;
  /** Further members of the problem document. */
  readonly members: Readonly<Record<string, unknown>>;

  constructor(
    readonly slug: ProblemSlug,
    detail: string,
    options: RefusalOptions = {},
  ) {
    super(detail);
    this.errors = options.errors ?? [];
    this.headers = options.headers ?? {};
    this.members = options.members ?? {};
  }

  get status(): number {
    return problemKind(this.slug).status;
  }
}

export function invalidInput(errors: readonly FieldError[]): Refusal {
  const detail = errors.length === 1 ? errors[0]!.detail : `${errors.length} fields are wrong`;
  return new Refusal('invalid-input', detail, { errors });
}

/** What an error is to the caller. What it was goes to the server's log, under the request id. */
export function refusalOf(error: unknown, requestId: string): Refusal {
  if (error instanceof Refusal) return error;
  console.error(JSON.stringify({ request_id: requestId, error: error instanceof Error ? error.stack : String(error) }));
  return isDatabaseAway(error)
    ? new Refusal('unavailable', 'the database is out of reach; try again in a moment', { headers: { 'Retry-After': '2' } })
    : new Refusal('internal-error', 'the service failed; the request id finds the cause in its log');
}

/** The record, or 404: the same for one that does not exist and one of another organization. */
export function found<T>(record: T | undefined): T {
  if (record === undefined) throw new Refusal('not-found', 'there is no such record');
  return record;
}
