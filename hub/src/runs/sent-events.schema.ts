import type { ParameterDecoratorOptions } from '@nestjs/common';
import { appendEventsSchema, appendToRunSchema, MAX_EVENTS_A_CALL } from '@steepfall/shared/contracts';
import { z } from 'zod';

type DoorSchema = NonNullable<ParameterDecoratorOptions['schema']>;

/** Anything with an id: each event is looked at by itself, so that one that cannot be read is refused alone. */
const sentEventSchema = z.looseObject({ id: z.uuid() });
const sentEvents = z.array(sentEventSchema).min(1).max(MAX_EVENTS_A_CALL);

const openDoor = z.strictObject({ events: sentEvents });
export type SentEvents = z.infer<typeof openDoor>;

const openSocketDoor = z.strictObject({ runId: z.uuid(), events: sentEvents });
export type SentToRun = z.infer<typeof openSocketDoor>;

/** Described to the world as what an event must be; held only against what the door needs to know. */
export const sentEventsSchema = describedAs(appendEventsSchema, openDoor);
export const sentToRunSchema = describedAs(appendToRunSchema, openSocketDoor);

function describedAs(described: z.ZodType, checked: z.ZodType): DoorSchema {
  const { validate } = checked['~standard'];
  return { '~standard': { ...described['~standard'], validate } };
}
