import { readMetricGauge } from '@/openapi/operations/tables';
import { handle, serve } from '../../../_request/serve';
import { readMetricGauge as read } from '../../../_request/tables';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(handle(readMetricGauge, ({ parameters, query }) => read(parameters.mm2, query)));
