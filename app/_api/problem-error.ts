/** A refusal as the API words it (RFC 9457), thrown by the client and shown by the pages. */
export interface Problem {
  readonly type: string;
  readonly title: string;
  readonly status: number;
  readonly detail?: string;
  readonly code: string;
  readonly errors?: readonly ProblemField[];
  readonly request_id?: string;
}

export interface ProblemField {
  readonly pointer?: string;
  readonly parameter?: string;
  readonly code: string;
  readonly detail: string;
}

export class ProblemError extends Error {
  override readonly name = 'ProblemError';

  constructor(
    readonly problem: Problem,
    /** From Retry-After, where the answer had one. */
    readonly retryAfterSeconds: number | null = null,
  ) {
    super(problem.detail ?? problem.title);
  }
}

/** The answer never came: the same shape, so that a page has one way to show a failure. */
export const unreachable: Problem = {
  type: 'about:blank',
  title: 'The service cannot be reached',
  status: 0,
  detail: 'no answer came back; check the network and try again',
  code: 'unreachable',
};

export function asProblem(error: unknown): Problem {
  return error instanceof ProblemError ? error.problem : unreachable;
}
