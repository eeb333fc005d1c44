import { listGauges } from '@/openapi/operations/tables';
import { handle, serve } from '../_request/serve';
import { listGauges as list } from '../_request/tables';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(handle(listGauges, ({ query }) => list(query)));
