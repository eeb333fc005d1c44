/** zod with `.openapi()`; imported instead of zod by every file of this folder, whose schemas need it at birth. */
import { extendZodWithOpenApi } from '@asteasolutions/zod-to-openapi';
import { z } from 'zod';

extendZodWithOpenApi(z);

export { z };
