import { randomUUID } from 'node:crypto';

/** A new identifier for a row. */
export const newId = (): string => randomUUID();
