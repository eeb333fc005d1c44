/**
 * Every kind of refusal, once: its status, title and what to do about it. The API answers, the OpenAPI
 * document and the pages under /problems are made from this list (RFC 9457).
 */
export interface ProblemKind {
  readonly status: number;
  readonly title: string;
  readonly meaning: string;
  readonly remedy: string;
}

export const problemKinds = {
  'malformed-request': {
    status: 400,
    title: 'The request cannot be read',
    meaning: 'The body is not JSON in UTF-8, or a header, a cursor or a repeated query parameter cannot be understood.',
    remedy: 'Send one JSON value in UTF-8, each query parameter once, and a cursor exactly as the last answer gave it.',
  },
  'key-in-url': {
    status: 400,
    title: 'An API key stands in the URL',
    meaning: 'URLs are written to logs and histories, so a key is never accepted there.',
    remedy: 'Send the key in the header Authorization: Bearer. Revoke the key that stood in the URL and issue another.',
  },
  'authentication-required': {
    status: 401,
    title: 'A key or a session is needed',
    meaning: 'The request names no caller.',
    remedy: 'Send Authorization: Bearer with an API key, or sign in to the console.',
  },
  'invalid-credentials': {
    status: 401,
    title: 'The key or session is not valid',
    meaning: 'The key is mistyped, unknown, revoked or past its expiry, or the session has ended.',
    remedy: 'Check the key for a missing character, ask an admin for a new one, or sign in again.',
  },
  'sign-in-failed': {
    status: 401,
    title: 'E-mail or password is wrong',
    meaning: 'No member has this e-mail address and password.',
    remedy: 'Check both and try again. After ten wrong tries an account waits fifteen minutes.',
  },
  'insufficient-scope': {
    status: 403,
    title: 'The key lacks the scope',
    meaning: 'The key is valid but was not issued for this operation.',
    remedy: 'Ask an admin for a key with the scope that the answer names. Keys and members are managed in the console, never with a key.',
  },
  'insufficient-role': {
    status: 403,
    title: 'The role does not allow this',
    meaning: 'The signed-in member has a role without this permission.',
    remedy: 'Ask an owner or admin of the organization.',
  },
  'address-not-allowed': {
    status: 403,
    title: 'The key may not be used from this address',
    meaning: 'The key carries an allow list of network addresses, and the request came from elsewhere.',
    remedy: 'Call from an allowed network, or ask an admin to change the list.',
  },
  'organization-disabled': {
    status: 403,
    title: 'The organization is disabled',
    meaning: 'All keys and sessions of the organization are suspended.',
    remedy: 'Ask the people who run this installation.',
  },
  'cross-origin': {
    status: 403,
    title: 'The request came from another site',
    meaning: 'A session only serves requests made by this site’s own pages.',
    remedy: 'Use an API key from scripts and other sites.',
  },
  'not-found': {
    status: 404,
    title: 'There is nothing here',
    meaning: 'The path or the record does not exist, or belongs to another organization.',
    remedy: 'Check the path against the API reference, and the id for a missing character.',
  },
  'method-not-allowed': {
    status: 405,
    title: 'The method is not supported here',
    meaning: 'The path exists and answers other methods.',
    remedy: 'Use one of the methods in the Allow header.',
  },
  'not-acceptable': {
    status: 406,
    title: 'No acceptable representation',
    meaning: 'The Accept header excludes every form that this path can answer in.',
    remedy: 'Accept application/json.',
  },
  'name-taken': {
    status: 409,
    title: 'The name is taken',
    meaning: 'Another key of the organization that is still in force has this name, and the call log would not tell them apart.',
    remedy: 'Choose another name, or revoke the other key first.',
  },
  'precondition-failed': {
    status: 412,
    title: 'The record has changed since it was read',
    meaning: 'The If-Match header names another version than the present one.',
    remedy: 'Read the record again and repeat the change on what it says now.',
  },
  'body-too-large': {
    status: 413,
    title: 'The body is too large',
    meaning: 'A request body may have at most 1 MiB.',
    remedy: 'Split the work over several calls, or give a sweep as start, stop and points.',
  },
  'unsupported-media-type': {
    status: 415,
    title: 'The media type is not supported',
    meaning: 'The body is not declared as JSON, or is compressed.',
    remedy: 'Send Content-Type: application/json and no Content-Encoding.',
  },
  'invalid-input': {
    status: 422,
    title: 'The input is wrong',
    meaning: 'The request is readable but some of its fields are missing, unknown, out of bounds or contradict each other.',
    remedy: 'Mend every field that the errors list names. A refused input costs no units.',
  },
  'precondition-required': {
    status: 428,
    title: 'The change must name the version it is based on',
    meaning: 'Two people may edit a record at once; If-Match keeps one from undoing the other unseen.',
    remedy: 'Read the record and send its ETag as If-Match.',
  },
  'burst-limit': {
    status: 429,
    title: 'Too many requests in a minute',
    meaning: 'The caller has used up its burst limit.',
    remedy: 'Wait for the seconds in Retry-After. The RateLimit header tells what is left.',
  },
  'quota-exceeded': {
    status: 429,
    title: 'The monthly unit quota does not cover this call',
    meaning: 'The key or the organization has fewer units left this month than the call costs.',
    remedy: 'Ask an admin to raise the quota, or wait for the first of the month (UTC).',
  },
  'too-many-attempts': {
    status: 429,
    title: 'Too many attempts',
    meaning: 'Signing in was tried too often from this address or for this account.',
    remedy: 'Wait for the seconds in Retry-After.',
  },
  'internal-error': {
    status: 500,
    title: 'The service failed',
    meaning: 'Something went wrong on our side. A call that fails this way costs no units.',
    remedy: 'Try again; if it persists, report the request id.',
  },
  unavailable: {
    status: 503,
    title: 'The service cannot answer now',
    meaning: 'The database is out of reach, and no call is answered without its record.',
    remedy: 'Wait for the seconds in Retry-After and try again.',
  },
} as const satisfies Record<string, ProblemKind>;

export type ProblemSlug = keyof typeof problemKinds;

export function problemKind(slug: ProblemSlug): ProblemKind {
  return problemKinds[slug];
}

export function isProblemSlug(text: string): text is ProblemSlug {
  return Object.hasOwn(problemKinds, text);
}
