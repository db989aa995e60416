import { z } from 'zod';
import { EmailAddress, Role } from '../accounts/contract';

export const Jurisdiction = z.enum(['ENG', 'WAL', 'SCO', 'NIR', 'IRL', 'FRA', 'other']);
export type Jurisdiction = z.infer<typeof Jurisdiction>;

/** Whether a name is one of the IANA time zone database's, as far as this machine knows them. */
export function isTimeZone(zone: string): boolean {
  try {
    return new Intl.DateTimeFormat('en-GB', { timeZone: zone }).format(0) !== '' && /^[A-Z]/.test(zone);
  } catch {
    return false;
  }
}

/** The version of what was looked at before a change, sent back with it. */
export const Version = z.int().min(1).max(2_000_000_000);
const words = (max: number) => z.string().trim().max(max);
export const Position = z.tuple([z.number().min(-180).max(180), z.number().min(-90).max(90)]); // lon, lat
export type Position = z.infer<typeof Position>;

/** What a fishery tells about itself. `gateCode` is shown to staff and, later, inside a ticket's hours only. */
export const FisheryDetails = z.strictObject({
  name: words(120).min(1),
  legalEntity: words(200),
  address: words(400),
  postcode: words(12),
  gridReference: words(20),
  position: Position,
  jurisdiction: Jurisdiction,
  zone: z.string().max(60).refine(isTimeZone, 'Not a time zone, like Europe/London'), // IANA
  vatStatus: z.enum(['registered', 'not_registered', 'exempt_body']),
  vatNumber: words(20),
  officeContact: words(200),
  dutyPhone: words(40),
  meetingPoint: words(400), // where an ambulance is met
  opening: words(200),
  facilities: words(400), // toilets, water, power
  conduct: words(400), // dogs, fires, barbecues, vehicles
  gateCode: words(40),
});
export type FisheryDetails = z.infer<typeof FisheryDetails>;

/** POST /api/fisheries makes one (its maker becomes owner); PUT /api/fisheries/:fisheryId changes it. */
export const MakeFishery = z.strictObject({ id: z.uuid(), details: FisheryDetails });
export type MakeFishery = z.infer<typeof MakeFishery>;
export const ChangeFishery = z.strictObject({ details: FisheryDetails, version: Version });
export type ChangeFishery = z.infer<typeof ChangeFishery>;

/** GET /api/fisheries/:fisheryId (public; `gateCode` is empty unless the reader is staff there). */
export const FisheryView = z.object({
  id: z.uuid(),
  details: FisheryDetails,
  version: z.int(),
  may: z.object({
    change: z.boolean(),
    invite: z.boolean(),
    addLakes: z.boolean(),
    seePeople: z.boolean(),
    readFeels: z.boolean().default(false), // how its bottoms feel through the lead
  }),
});
export type FisheryView = z.infer<typeof FisheryView>;

/** GET /api/fisheries: every fishery and its lakes, for the front door. */
export const FisheryListItem = z.object({
  id: z.uuid(),
  name: z.string(),
  position: Position,
  lakes: z.array(
    z.object({
      id: z.uuid(),
      name: z.string(),
      areaM2: z.number(),
      pegs: z.int(),
      nights: z.boolean(),
      chart: z.object({ id: z.uuid(), version: z.string() }).nullable(),
    }),
  ),
});
export type FisheryListItem = z.infer<typeof FisheryListItem>;
export const FisheryList = z.object({ fisheries: z.array(FisheryListItem) });

/** GET /api/fisheries/:fisheryId/people (staff who may). */
export const PersonView = z.object({
  accountId: z.uuid(),
  name: z.string(),
  email: z.string(),
  roles: z.array(Role),
});
export type PersonView = z.infer<typeof PersonView>;
export const InvitationView = z.object({
  id: z.uuid(),
  email: z.string(),
  role: Role,
  state: z.enum(['waiting', 'accepted', 'expired', 'withdrawn']),
  expiresAt: z.iso.datetime(),
});
export type InvitationView = z.infer<typeof InvitationView>;
export const PeopleView = z.object({
  people: z.array(PersonView),
  invitations: z.array(InvitationView),
  mayGive: z.array(Role), // the roles this reader may give and take away
});
export type PeopleView = z.infer<typeof PeopleView>;

/** POST /api/fisheries/:fisheryId/invitations → 201 InvitationView; DELETE …/invitations/:id withdraws → 204. */
export const Invite = z.strictObject({ email: EmailAddress, role: Role });
export type Invite = z.infer<typeof Invite>;
/**
 * GET /api/invitations/:token shows; POST /api/invitations/accept takes it up for the signed-in account, whose address
 * must be the invited one, and answers its AccountView with the new role. Inviting again sends a new link.
 */
export const InvitationShown = z.object({ fisheryName: z.string(), role: Role, email: z.string() });
export type InvitationShown = z.infer<typeof InvitationShown>;
export const AcceptInvitation = z.strictObject({ token: z.string().min(20).max(200) });
export type AcceptInvitation = z.infer<typeof AcceptInvitation>;
/**
 * PUT /api/fisheries/:fisheryId/people/:accountId → PeopleView: the whole list of roles; an empty one takes the person
 * out. Never leaves a fishery without an owner.
 */
export const SetRoles = z.strictObject({ roles: z.array(Role).max(7) });
export type SetRoles = z.infer<typeof SetRoles>;
