/** How long a line is. */
import { z } from 'zod';

/** The example is the calculation's own, for it is shown beside the others of its form. */
export const lineLength = (example: number) => z.number().min(0).max(1e9).meta({ title: 'Length', description: 'Length of the line.', examples: [example], 'x-unit': 'm' });
