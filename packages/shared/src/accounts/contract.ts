import { z } from 'zod';

/** Roles are held at a fishery; one person may hold several there, and others elsewhere. */
export const Role = z.enum(['owner', 'manager', 'head_bailiff', 'bailiff', 'office', 'member', 'angler']);
export type Role = z.infer<typeof Role>;

export const EmailAddress = z.string().trim().toLowerCase().max(254).pipe(z.email());
/** Length only, as NIST SP 800-63B §5.1.1 asks: no rules of composition. */
export const NewPassword = z.string().min(12).max(200);

/** How this reader likes lengths; what is stored stays in metres. */
export const Units = z.strictObject({
  length: z.enum(['m', 'ft']),
  stickSpacingM: z.number().min(0.3).max(10), // the reader's own distance sticks
});
export type Units = z.infer<typeof Units>;

/** POST /api/accounts → 202 always, whether or not the address was known. A link is mailed. */
export const SignUp = z.strictObject({
  name: z.string().trim().min(1).max(120),
  email: EmailAddress,
  password: NewPassword,
});
export type SignUp = z.infer<typeof SignUp>;

/**
 * POST /api/accounts/verify-again → 202 always: mails the link once more to an address still to be confirmed.
 * Signing in before that is answered `forbidden` (only to who knows the password): offer this then.
 */
export const AskVerifyAgain = z.strictObject({ email: EmailAddress });
export type AskVerifyAgain = z.infer<typeof AskVerifyAgain>;

/** POST /api/accounts/verify → 204; the same link twice is no fault. The mailed link is `/verify?token=…`. */
export const VerifyEmail = z.strictObject({ token: z.string().min(20).max(200) });
export type VerifyEmail = z.infer<typeof VerifyEmail>;

/** POST /api/accounts/reset-request → 202 always. */
export const AskReset = z.strictObject({ email: EmailAddress });
export type AskReset = z.infer<typeof AskReset>;

/** POST /api/accounts/reset → 204: ends every open sign-in of the account. The mailed link is `/reset-password?token=…`. */
export const ResetPassword = z.strictObject({ token: z.string().min(20).max(200), password: NewPassword });
export type ResetPassword = z.infer<typeof ResetPassword>;

/** POST /api/accounts/session: signs in. Sets the refresh cookie; answers SignedIn. */
export const SignIn = z.strictObject({ email: EmailAddress, password: z.string().min(1).max(200) });
export type SignIn = z.infer<typeof SignIn>;

export const AccountView = z.object({
  id: z.uuid(),
  name: z.string(),
  email: z.string(),
  units: Units,
  roles: z.array(z.object({ fisheryId: z.uuid(), fisheryName: z.string(), role: Role })),
});
export type AccountView = z.infer<typeof AccountView>;

/**
 * Answer of POST /api/accounts/session and POST /api/accounts/session/refresh (cookie only, header
 * `X-Mereward: 1`). DELETE /api/accounts/session signs out; DELETE /api/accounts/sessions everywhere.
 */
export const SignedIn = z.object({
  accessToken: z.string(),
  expiresInS: z.int(),
  account: AccountView,
});
export type SignedIn = z.infer<typeof SignedIn>;

/** GET and PATCH /api/accounts/me */
export const ChangeDetails = z.strictObject({ name: z.string().trim().min(1).max(120), units: Units });
export type ChangeDetails = z.infer<typeof ChangeDetails>;

/**
 * POST /api/accounts/me/device-key: the key with which this account's phones seal what they have still to send, 32 bytes
 * as base64url. Made at the first asking and the same ever after: what lies sealed on a phone must open again.
 */
export const DeviceKeyView = z.object({ key: z.base64url() });
export type DeviceKeyView = z.infer<typeof DeviceKeyView>;
