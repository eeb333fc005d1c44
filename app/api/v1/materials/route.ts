import { listMaterials } from '@/openapi/operations/tables';
import { handle, serve } from '../_request/serve';
import { listMaterials as list } from '../_request/tables';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(handle(listMaterials, list));
