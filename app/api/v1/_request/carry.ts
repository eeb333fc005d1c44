/**
 * The path of a request: identify, admit, parse, meter, compute, record, respond. Admission and metering
 * are one round trip and need the price, so the input is parsed before it; its refusal is carried until
 * the caller is known, and the answer's precedence is that of the path.
 */
import type { Operation } from '@/openapi/operation';
import { admit, type Admission, type Caller } from './admit';
import { beginExchange, type Exchange } from './exchange';
import { identify } from './identify';
import { parse, type Input, type RawParameters } from './parse';
import { record } from './record';
import { refusalOf } from './refusal';
import { problemReply, respond, type Reply } from './respond';

export interface Context extends Input {
  readonly request: Request;
  readonly exchange: Exchange;
  readonly caller: Caller | null;
  readonly admission: Admission;
}

/** An operation with what it does. */
export interface Task {
  readonly operation: Operation;
  /** Group and id where the task is a calculation: it is then priced and recorded. */
  readonly calculation?: string;
  price?(input: Input): number;
  run(context: Context): Promise<Reply> | Reply;
}

export async function carry(task: Task, request: Request, rawParameters: RawParameters): Promise<Response> {
  const exchange = beginExchange(request);
  try {
    const credential = await identify(request, task.operation);
    const parsed = await parse(request, task.operation, rawParameters);
    const price = parsed.input && task.price ? task.price(parsed.input) : 0;
    const admission = await admit(credential, task.operation, exchange, price);
    const refusal = admission.refusal ?? parsed.refusal;
    const outcome = refusal
      ? problemReply(refusal, exchange)
      : await attempt(task, { ...parsed.input!, request, exchange, caller: admission.caller, admission });
    const units = outcome.status < 400 ? admission.chargedUnits : 0;
    if (task.calculation) await record(task.calculation, exchange, admission, parsed, outcome, units);
    return respond(request, exchange, outcome, admission.limits, units);
  } catch (error) {
    return respond(request, exchange, problemReply(refusalOf(error, exchange.requestId), exchange));
  }
}

/** A failure here still has a known caller and so a row in the log. */
async function attempt(task: Task, context: Context): Promise<Reply> {
  try {
    return await task.run(context);
  } catch (error) {
    return problemReply(refusalOf(error, context.exchange.requestId), context.exchange);
  }
}
