import { z } from 'zod';

/** The schema of every id in a path: `@Param('id', { schema: idSchema }) id: string`. */
export const idSchema = z.uuid();
