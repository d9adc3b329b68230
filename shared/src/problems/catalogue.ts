/**
 * Every problem a person or a device can be told of. Clients switch on the type, never on the text.
 * 400 unreadable, 401 not signed in, 403 not allowed, 404 not there, 409 conflict, 410 over, 413 too large, 422 readable but wrong,
 * 429 too often, 500 ours, 503 not now.
 */
export const problemCatalogue = {
  'not-readable': { status: 400, title: 'The request could not be read' },
  'not-signed-in': { status: 401, title: 'Not signed in' },
  'wrong-credentials': { status: 401, title: 'E-mail or password is wrong' },
  'session-expired': { status: 401, title: 'The session has ended' },
  'device-token-unknown': { status: 401, title: 'The device token is not known' },
  'follow-link-unknown': { status: 401, title: 'This link opens nothing' },
  'not-allowed': { status: 403, title: 'Your role does not allow this' },
  'not-found': { status: 404, title: 'Not found' },
  'run-not-found': { status: 404, title: 'There is no such run' },
  'already-exists': { status: 409, title: 'It exists already' },
  'changed-meanwhile': { status: 409, title: 'Someone else changed it first' },
  'last-owner': { status: 409, title: 'A house keeps at least one owner' },
  'batch-already-running': { status: 409, title: 'This batch has a run already' },
  'probe-in-use': { status: 409, title: 'The probe is in another kettle' },
  'not-enough-stock': { status: 409, title: 'The stores hold less than that' },
  'batch-not-planned': { status: 409, title: 'The batch is not waiting any more' },
  'run-already-started': { status: 409, title: 'The run has already started' },
  'run-not-started': { status: 409, title: 'The run has not started' },
  'run-not-ended': { status: 409, title: 'The run goes on' },
  'run-already-ended': { status: 409, title: 'The run has ended' },
  'step-already-done': { status: 409, title: 'The step is done already' },
  'step-not-current': { status: 409, title: 'Another step comes first' },
  'nothing-to-undo': { status: 409, title: 'There is nothing to undo' },
  'event-id-taken': { status: 409, title: 'Another event has this id' },
  'follow-link-over': { status: 410, title: 'This link is over' },
  'too-large': { status: 413, title: 'Too much at once' },
  'not-valid': { status: 422, title: 'Some of this does not fit' },
  'too-many-tries': { status: 429, title: 'Too many tries' },
  'internal-error': { status: 500, title: 'Something went wrong at the hub' },
  unavailable: { status: 503, title: 'The hub cannot do this just now' },
} as const satisfies Record<string, { status: number; title: string }>;

export type ProblemType = keyof typeof problemCatalogue;
