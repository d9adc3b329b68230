import { z } from 'zod';

/**
 * One reading of a probe, as it came: driver codes such as -127 are kept, and judged by the watch.
 * `tempC` is null when the device itself says that it has no signal.
 */
export const readingSchema = z
  .strictObject({
    /** When it was taken, epoch ms. */
    atMs: z.int().nonnegative(),
    tempC: z.number().nullable(),
  })
  .meta({ id: 'Reading' });
export type Reading = z.infer<typeof readingSchema>;
