import { z } from 'zod';
import { Version } from '../fisheries/contract';
import { Acknowledgement, ChangeWeight, Rule, RuleSheet, SheetNumber } from './contract';

/** A rule as it is told; a newer server may say more of it. */
const RuleView = z.object(Rule.shape);

/** What happened to a rule between two versions. Words are runs of the text: kept, gone or new. */
const WordRunView = z.object({ kind: z.enum(['same', 'gone', 'new']), text: z.string() });
export const RuleChangeView = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('added'), rule: RuleView }),
  z.object({ kind: z.literal('removed'), rule: RuleView }),
  z.object({
    kind: z.literal('changed'),
    before: RuleView,
    after: RuleView,
    words: z.array(WordRunView),
    fields: z.array(z.string()),
  }),
]);
export type RuleChangeView = z.infer<typeof RuleChangeView>;

/** A published version: frozen. `changes` are those since the version before it; null for the first. */
export const SheetView = z.object({
  ...SheetNumber.shape,
  id: z.uuid(),
  weight: ChangeWeight,
  publishedAt: z.iso.datetime(),
  rules: z.array(RuleView),
  changes: z.array(RuleChangeView).nullable(),
});
export type SheetView = z.infer<typeof SheetView>;

/** GET /api/fisheries/:fisheryId/rules (open): the rules in force; null when none were ever published. */
export const RulesView = z.object({
  fisheryId: z.uuid(),
  fisheryName: z.string(),
  sheet: SheetView.nullable(),
  /** The newest version the reader has read; null: none, or a stranger. */
  read: z
    .object({
      ...SheetNumber.shape,
      at: z.iso.datetime(),
      method: Acknowledgement.shape.method,
    })
    .nullable(),
  /** What changed since they read it; null where that is the whole sheet. */
  since: z.array(RuleChangeView).nullable(),
  may: z.object({
    acknowledge: z.boolean(),
    versions: z.boolean(),
    write: z.boolean(),
    publish: z.boolean(),
    readers: z.boolean(),
  }),
});
export type RulesView = z.infer<typeof RulesView>;

/** GET /api/fisheries/:fisheryId/rules/versions (members, staff; others those they have read), the newest first. */
export const SheetList = z.object({
  versions: z.array(
    z.object({
      ...SheetNumber.shape,
      id: z.uuid(),
      weight: ChangeWeight,
      publishedAt: z.iso.datetime(),
      words: z.string(), // “2 rules changed”
      readers: z.int().nullable(), // how many have read it, for staff
    }),
  ),
});
export type SheetList = z.infer<typeof SheetList>;

/** GET /api/fisheries/:fisheryId/rules/draft (office, manager, owner); null when nobody has begun one. */
export const DraftView = z.object({
  id: z.uuid(),
  rules: z.array(RuleView),
  version: z.int(),
  changes: z.array(RuleChangeView), // against the version in force
  words: z.string(),
  least: ChangeWeight, // the slightest weight it may be published with
  suggested: ChangeWeight,
  upcoming: z.int(), // bookings to come, which a safety change asks again
});
export type DraftView = z.infer<typeof DraftView>;
export const DraftAnswer = z.object({
  draft: DraftView.nullable(),
  inForce: SheetView.nullable(),
  may: z.object({ write: z.boolean(), publish: z.boolean() }),
});
export type DraftAnswer = z.infer<typeof DraftAnswer>;

/**
 * PUT /api/fisheries/:fisheryId/rules/draft (office, manager): the fishery's one draft. `version` null begins it.
 * DELETE throws it away; what is in force stays.
 */
export const PutDraft = z.strictObject({ id: z.uuid(), sheet: RuleSheet, version: Version.nullable() });
export type PutDraft = z.infer<typeof PutDraft>;

/** POST /api/fisheries/:fisheryId/rules/publish (manager, owner): the draft as it was read. */
export const PublishDraft = z.strictObject({ draftId: z.uuid(), version: Version, weight: ChangeWeight });
export type PublishDraft = z.infer<typeof PublishDraft>;

/**
 * POST /api/fisheries/:fisheryId/rules/acknowledge: the reader has read a version. The newest is in force by then?
 * They are told `conflict` and shown the newer one. The same id again is no fault.
 */
export const AcknowledgeRules = Acknowledgement.omit({ method: true });
export type AcknowledgeRules = z.infer<typeof AcknowledgeRules>;

/** POST /api/bookings/:bookingId/rules/witnessed (bailiff and up, office): read out, or signed on paper, before a witness. */
export const WitnessReading = Acknowledgement.extend({ method: z.enum(['paper', 'verbal']) });
export type WitnessReading = z.infer<typeof WitnessReading>;

/** How and when a version was read. `witness` is a name, for a reading on paper or aloud. */
export const ReadingView = z.object({
  id: z.uuid(),
  version: SheetNumber,
  method: Acknowledgement.shape.method,
  witness: z.string().nullable(),
  deviceAt: z.iso.datetime(), // as the device told it; counts as the time of reading
  at: z.iso.datetime(), // when the server heard
  language: z.string(),
});
export type ReadingView = z.infer<typeof ReadingView>;

/** GET /api/bookings/:bookingId/rules (its holder, staff): what is to be read for it, or was. */
export const RulesToReadView = z.object({
  bookingId: z.uuid(),
  fisheryId: z.uuid(),
  needed: z.boolean(),
  blocks: z.enum(['ticket', 'arrival', 'nothing']),
  words: z.string(), // “Not valid until the rules are read”; '' when nothing is to be read
  sheet: SheetView.nullable(), // the version to read: the rules that hold for this booking
  since: z.array(RuleChangeView).nullable(), // what changed since the last reading; null: all of it is new
  readings: z.array(ReadingView), // the newest first
  goodFrom: z.iso.datetime().nullable(), // from when the ticket is good, once read
  may: z.object({ acknowledge: z.boolean(), witness: z.boolean() }),
});
export type RulesToReadView = z.infer<typeof RulesToReadView>;

/** GET /api/fisheries/:fisheryId/rules/readers (staff): bookings to come, and what their holders have read. */
export const ReadersView = z.object({
  inForce: SheetNumber.nullable(),
  readers: z.array(
    z.object({
      bookingId: z.uuid(),
      holder: z.string(),
      code: z.string(),
      from: z.iso.datetime(),
      zone: z.string(),
      needed: z.boolean(),
      reading: ReadingView.nullable(), // the newest of theirs
    }),
  ),
});
export type ReadersView = z.infer<typeof ReadersView>;

/** GET /api/rule-sheets/:sheetId/sheet.pdf: to print; `large` for eyes that want it. */
export const SheetPaperAsked = z.object({ print: z.enum(['plain', 'large']).default('plain') });
