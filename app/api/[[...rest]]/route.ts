/** Every path under /api that is nothing else, in our own error shape. */
import { serveResolved } from '../v1/_request/serve';

export const { GET, HEAD, POST, PUT, PATCH, DELETE, OPTIONS } = serveResolved(() => null);
