import { MemberEmail } from './member.ts';
import { z } from './zod.ts';

export const MIN_PASSWORD_LENGTH = 10;
export const MAX_PASSWORD_LENGTH = 128;

export const Password = z
  .string()
  .min(MIN_PASSWORD_LENGTH, `A password has at least ${MIN_PASSWORD_LENGTH} characters.`)
  .max(MAX_PASSWORD_LENGTH, `A password has up to ${MAX_PASSWORD_LENGTH} characters.`);

export const PersonName = z
  .string()
  .trim()
  .min(1, 'Give a name: the record and the memos carry it.')
  .max(120, 'A name has up to 120 characters.');

/** The person signed in. `version` is the ETag of the name, for stale writes. */
export const Account = z
  .object({
    userId: z.string(),
    name: z.string(),
    email: z.string(),
    administrator: z.boolean(),
    version: z.int(),
  })
  .meta({ id: 'Account' });
export type Account = z.infer<typeof Account>;

export const AccountPatch = z
  .strictObject({ name: PersonName, version: z.int().optional() })
  .meta({ id: 'AccountPatch' });
export type AccountPatch = z.infer<typeof AccountPatch>;

/** A key for scripts. `start` are its first characters, so that its owner can tell keys apart. */
export const PersonalKey = z
  .object({
    id: z.uuid(),
    name: z.string(),
    start: z.string(),
    createdAt: z.iso.datetime(),
    lastUsedAt: z.iso.datetime().nullable(),
  })
  .meta({ id: 'PersonalKey' });
export type PersonalKey = z.infer<typeof PersonalKey>;

export const PersonalKeyList = z.object({ items: z.array(PersonalKey), total: z.int() });
export type PersonalKeyList = z.infer<typeof PersonalKeyList>;

export const PersonalKeyInput = z
  .strictObject({
    name: z
      .string()
      .trim()
      .min(1, 'Say what the key is for.')
      .max(60, 'A key’s name has up to 60 characters.'),
  })
  .meta({ id: 'PersonalKeyInput' });
export type PersonalKeyInput = z.infer<typeof PersonalKeyInput>;

/** The one answer that carries the key itself. */
export const MadeKey = PersonalKey.extend({ key: z.string() }).meta({ id: 'MadeKey' });
export type MadeKey = z.infer<typeof MadeKey>;

/** What whoever holds an invitation's link sends. `email` only with the first administrator's link. */
export const Acceptance = z
  .strictObject({ name: PersonName, password: Password, email: MemberEmail.optional() })
  .meta({ id: 'Acceptance' });
export type Acceptance = z.infer<typeof Acceptance>;

/** The forms of the pages before sign-in; better-auth's endpoints take what they send. */
export const SignInForm = z.object({
  email: MemberEmail,
  password: z.string().min(1, 'Give the password.'),
});
export const SignUpForm = z.object({ name: PersonName, email: MemberEmail, password: Password });
export const ForgottenForm = z.object({ email: MemberEmail });
export const ResetForm = z.object({ newPassword: Password });
export const PasswordForm = z.object({
  currentPassword: z.string().min(1, 'Give the present password.'),
  newPassword: Password,
});
