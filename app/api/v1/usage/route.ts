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
    const end = query.to ? Date.parse(query.to) : exchange.startedAt;
    const start = query.from ? Date.parse(query.from) : end - defaultDays * dayMilliseconds;
    const days = (end - start) / dayMilliseconds;
    if (!(days > 0 && days <= mostDays)) {
      throw invalidInput([{ parameter: 'from', code: 'out_of_bounds', detail: `from must lie before to by at most ${mostDays} days` }]);
    }
    // The database reads fewer offsets than the API takes, hence both in UTC.
    const [from, to] = [new Date(start).toISOString(), new Date(end).toISOString()];
    return reply(200, await readUsage(known(caller).organizationId, from, to, query.by));
  }),
);
