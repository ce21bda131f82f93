import { z } from 'zod';
import { TOKEN_SCOPES } from '@/lib/token-scopes';

/** For how many days a token can be made in the browser. */
export const TOKEN_LIFETIMES = [30, 90, 180, 365] as const;

/** Boxes of one name: none, one or several ticked. */
const boxes = <T extends z.ZodType<unknown, string>>(box: T) =>
  z.preprocess((value) => (value === undefined ? [] : Array.isArray(value) ? value : [value]), z.array(box));

export const newTokenSchema = z.object({
  name: z.string().trim().min(1, 'Name it after what will use it.').max(100, 'Use at most 100 characters.'),
  scopes: boxes(z.enum(TOKEN_SCOPES)).refine((scopes) => scopes.length > 0, 'Tick at least one.'),
  programs: boxes(z.string().max(64)),
  days: z.coerce
    .number()
    .refine((days) => TOKEN_LIFETIMES.some((each) => each === days), 'Choose one of these.'),
});

export const tokenChoiceSchema = z.object({ id: z.string().min(1).max(64) });
