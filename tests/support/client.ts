/**
 * The API as a client sees it. Every answer is held against the published document before a test gets it,
 * so that no test can pass on an answer that the document does not promise.
 */
import { Agent, type Dispatcher } from 'undici';
import { checkAnswer, type Answer } from './answer-check';

export type { Answer } from './answer-check';

export interface CallOptions {
  readonly key?: string;
  readonly cookie?: string;
  /** Sent as JSON. */
  readonly body?: unknown;
  /** Sent as it is; with a stream the length is not declared. */
  readonly rawBody?: Dispatcher.DispatchOptions['body'];
  readonly headers?: Record<string, string | string[] | undefined>;
  /** Local address to call from; any of 127.0.0.0/8 reaches the server. */
  readonly from?: string;
  /** Another server than the run's own. */
  readonly server?: string;
}

const dispatchers = new Map<string, Agent>();

function dispatcherFrom(localAddress: string): Agent {
  let agent = dispatchers.get(localAddress);
  if (!agent) {
    agent = new Agent({ localAddress, connections: 32, pipelining: 1, keepAliveTimeout: 4000 });
    dispatchers.set(localAddress, agent);
  }
  return agent;
}

export function serverUrl(): string {
  const url = process.env.LINEWRIGHT_URL;
  if (!url) throw new Error('LINEWRIGHT_URL is not set: the live tests need a running server');
  return url;
}

/** `path` begins with /api. */
export async function call(method: string, path: string, options: CallOptions = {}): Promise<Answer> {
  const { key, cookie, body, rawBody, headers, from = '127.0.0.1', server = serverUrl() } = options;
  // The dispatcher sends the path as it stands; a URL object would have mended it first.
  const response = await dispatcherFrom(from).request({
    origin: server,
    path,
    method: method as Dispatcher.HttpMethod,
    headers: {
      ...(key !== undefined && { authorization: `Bearer ${key}` }),
      ...(cookie !== undefined && { cookie }),
      ...((body !== undefined || rawBody !== undefined) && { 'content-type': 'application/json' }),
      ...headers,
    },
    body: rawBody ?? (body === undefined ? null : JSON.stringify(body)),
  });
  const text = await response.body.text();
  const answer: Answer = {
    status: response.statusCode,
    headers: Object.fromEntries(Object.entries(response.headers).map(([name, value]) => [name, Array.isArray(value) ? value.join(', ') : String(value)])),
    text,
    body: jsonOf(text),
  };
  checkAnswer(method, path.split('?')[0]!, answer);
  return answer;
}

function jsonOf(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}
