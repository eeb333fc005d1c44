import { listMethods } from '@/openapi/operations/catalogue';
import { listMethods as list } from '../_request/describe';
import { handle, serve } from '../_request/serve';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(handle(listMethods, list));
