import { findCalculation } from '@/lib/solvers/registry';
import { describeCalculation } from '@/openapi/operations/catalogue';
import { describe } from '../../../_request/describe';
import { Refusal } from '../../../_request/refusal';
import { handle, serve } from '../../../_request/serve';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(
  handle(describeCalculation, ({ parameters }) => {
    const found = findCalculation(parameters.group, parameters.calculation);
    if (!found) throw new Refusal('not-found', 'there is no calculation of this group and id');
    return describe(found);
  }),
);
