import { v7 } from 'uuid';

/** A new id for a row or an event; ids sort by the time they were made. */
export const newId: () => string = () => v7();
