import document from '@/openapi/openapi.json';
import { readDocument } from '@/openapi/operations/service';
import { taggedReply } from '../_request/respond';
import { handle, serve } from '../_request/serve';

const answer = taggedReply(JSON.stringify(document));

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serve(handle(readDocument, () => answer));
