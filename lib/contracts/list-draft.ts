import { z } from 'zod';
import { reasonSchema } from './codes';
import { editProblemSchema } from './list-edits';
import { listRowSchema } from './list-rows';

/** So many rows can be edited in one draft; more belong in a file. */
export const DRAFT_ROWS = 10_000;

/** So many rows of a draft travel in one patch. */
export const PATCH_ROWS = 1_000;

const text = z
  .string()
  .max(8192)
  .refine((value) => !value.includes('\u0000'), 'A text cannot hold a NUL character.');
const name = text.min(1);

/** Texts by column name, in the list's own units and signs, as they would stand in its file; '' blanks a cell. */
const fields = z.record(name, text);

/**
 * What a draft does to one row of the revision that it is made from, or one row that it adds. Added rows have an id of their own,
 * for their item may be blank or taken while it is being typed, and a place among each other.
 */
export const draftEditSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('change'), item: name, fields }),
  z.object({ kind: z.literal('remove'), item: name }),
  z.object({
    kind: z.literal('add'),
    id: z.string().regex(/^[a-z0-9-]{1,40}$/),
    place: z.number().finite(),
    fields,
  }),
]);
export type DraftEdit = z.output<typeof draftEditSchema>;

const version = z.number().int().min(1);
const revision = z.number().int().min(1);

/** `version` is that of the draft as it was seen; 0 begins one. */
export const patchDraftSchema = z.object({
  base: revision,
  version: z.number().int().min(0),
  put: z.array(draftEditSchema).max(PATCH_ROWS),
  drop: z.array(name).max(PATCH_ROWS).describe('Keys of rows that are no longer edited'),
});
export type DraftPatch = z.output<typeof patchDraftSchema>;

/** When and how much, without the edits themselves. */
const draftFacts = z.object({
  base: revision,
  since: z.iso.datetime(),
  changedAt: z.iso.datetime(),
  rows: z.number().int(),
});

export const patchedDraftSchema = draftFacts.extend({
  version,
  problems: z
    .array(editProblemSchema)
    .describe('Of the edits as a set: items taken, parents that are not there'),
});
export type PatchedDraft = z.output<typeof patchedDraftSchema>;

export const draftSchema = patchedDraftSchema.extend({
  edits: z.array(draftEditSchema),
  stated: z
    .array(z.object({ index: z.number().int(), row: listRowSchema }))
    .describe('The edited rows as the base revision has them, and their places in it from 0'),
});
export type Draft = z.output<typeof draftSchema>;

/** Who is at work on a list. */
export const presenceSchema = z.object({
  newest: z.object({ number: revision, author: z.string(), at: z.iso.datetime() }),
  mine: draftFacts.extend({ version }).nullable(),
  others: z.array(draftFacts.extend({ name: z.string() })),
});
export type Presence = z.output<typeof presenceSchema>;

/** One field of a row that two people changed: as it was, as each has it; null where that side has no such row. */
const clashField = z.object({
  column: z.string(),
  before: z.string().nullable(),
  mine: z.string().nullable(),
  theirs: z.string().nullable(),
});

/**
 * A row that both changed. `fields`: both changed these; `they-removed` and `i-removed`: one changed what the other took away;
 * `both-added`: both added a row of this item. Of the first and last each field is chosen, of the others the row.
 */
export const clashSchema = z.object({
  key: z.string(),
  item: z.string(),
  kind: z.enum(['fields', 'they-removed', 'i-removed', 'both-added']),
  fields: z.array(clashField),
});
export type Clash = z.output<typeof clashSchema>;

/** `column` null chooses for the whole row. */
const choiceSchema = z.object({
  key: name,
  column: name.nullable(),
  take: z.enum(['mine', 'theirs']),
});
export type Choice = z.output<typeof choiceSchema>;

/** Carries a draft over to a newer revision. */
export const moveDraftSchema = z.object({
  version,
  onto: revision,
  choices: z.array(choiceSchema).max(100_000),
});

/** What a newer revision did to a draft, that needs no choice: rows that both changed in different fields, edits that it has too. */
const merged = z.object({ together: z.array(z.string()), settled: z.array(z.string()) });

export const clashesSchema = z.object({
  status: z.literal('clashes'),
  onto: revision,
  author: z.string(),
  at: z.iso.datetime(),
  clashes: z.array(clashSchema),
});
export type Clashes = z.output<typeof clashesSchema>;

export const movedDraftSchema = z.discriminatedUnion('status', [
  z.object({ status: z.literal('moved'), draft: draftSchema, merged }),
  clashesSchema,
]);

export const saveDraftSchema = z.object({ version, reason: reasonSchema });

export const savedDraftSchema = z.discriminatedUnion('status', [
  z.object({
    status: z.literal('saved'),
    revision,
    merged: merged.nullable().describe('Where the list had moved on; null otherwise'),
  }),
  z.object({
    status: z.literal('problems'),
    problems: z.array(editProblemSchema),
    count: z.number().int().describe('Of all problems; the first 200 are told'),
  }),
  clashesSchema,
]);
export type SavedDraft = z.output<typeof savedDraftSchema>;
