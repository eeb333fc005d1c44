import { readAwgGauge } from '@/openapi/operations/tables';
import { handle, serve } from '../../../_request/serve';
import { readAwgGauge as read } from '../../../_request/tables';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(handle(readAwgGauge, ({ parameters, query }) => read(parameters.number, query)));
