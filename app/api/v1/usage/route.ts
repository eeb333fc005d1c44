import { readUsage } from '@/lib/usage/usage';
import { readUsage as readUsageOperation } from '@/openapi/operations/usage';
import { known } from '../_request/caller';
import { invalidInput } from '../_request/refusal';
import { reply } from '../_request/respond';
import { handle, serve } from '../_request/serve';

const dayMilliseconds = 86_400_000;
const defaultDays = 30;
const mostDays = 366;

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(
  handle(readUsageOperation, async ({ caller, query, exchange }) => {
    const to = query.to ?? new Date(exchange.startedAt).toISOString();
    const from = query.from ?? new Date(Date.parse(to) - defaultDays * dayMilliseconds).toISOString();
    const days = (Date.parse(to) - Date.parse(from)) / dayMilliseconds;
    if (!(days > 0 && days <= mostDays)) {
      throw invalidInput([{ parameter: 'from', code: 'out_of_bounds', detail: `from must lie before to by at most ${mostDays} days` }]);
    }
    return reply(200, await readUsage(known(caller).organizationId, from, to, query.by));
  }),
);
