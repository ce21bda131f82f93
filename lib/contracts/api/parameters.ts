import { z } from 'zod';

/** Parameters of paths. They are looked up, not parsed: an unknown one is not found. */
export const programParameter = z.string().describe('Code of a program, e.g. dunlin-40');
export const listParameter = z.string().describe('Code of a mass list, e.g. wing-structure');
export const importParameter = z.string().describe('Identifier of an import, as the upload answered it');
