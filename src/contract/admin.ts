import { listOf } from './list.ts';
import { MemberEmail } from './member.ts';
import { StudyRole } from './study.ts';
import { VehicleInput } from './vehicle.ts';
import { z } from './zod.ts';

/** Someone with an account. People are deactivated, never deleted: the record keeps their names. */
export const Person = z
  .object({
    userId: z.string(),
    name: z.string(),
    email: z.string(),
    administrator: z.boolean(),
    active: z.boolean(),
    you: z.boolean(),
    createdAt: z.iso.datetime(),
    /** When a session of theirs was last in use, as far as one is left. */
    lastSeenAt: z.iso.datetime().nullable(),
    version: z.int(),
  })
  .meta({ id: 'Person' });
export type Person = z.infer<typeof Person>;

export const PersonList = listOf(Person);
export type PersonList = z.infer<typeof PersonList>;

export const PersonPatch = z
  .strictObject({
    administrator: z.boolean().optional(),
    active: z.boolean().optional(),
    version: z.int().optional(),
  })
  .meta({ id: 'PersonPatch' });
export type PersonPatch = z.infer<typeof PersonPatch>;

/** An invitation that was neither accepted nor withdrawn. Its link went out by mail and is nowhere else. */
export const Invitation = z
  .object({
    id: z.uuid(),
    email: z.string(),
    administrator: z.boolean(),
    invitedBy: z.string().nullable(),
    createdAt: z.iso.datetime(),
    expiresAt: z.iso.datetime(),
    expired: z.boolean(),
  })
  .meta({ id: 'Invitation' });
export type Invitation = z.infer<typeof Invitation>;

/** An address that a lead made a member before it had an account. In which study is not said. */
export const InvitationRequest = z
  .object({
    email: z.string(),
    since: z.iso.datetime(),
    studies: z.int(),
    askedBy: z.string().nullable(),
  })
  .meta({ id: 'InvitationRequest' });
export type InvitationRequest = z.infer<typeof InvitationRequest>;

export const InvitationList = listOf(Invitation).extend({ requests: z.array(InvitationRequest) });
export type InvitationList = z.infer<typeof InvitationList>;

export const InvitationInput = z
  .strictObject({ email: MemberEmail, administrator: z.boolean().default(false) })
  .meta({ id: 'InvitationInput' });
export type InvitationInput = z.infer<typeof InvitationInput>;

/** A study without an active lead, as an administrator may know it: by its members, not by what it holds. */
export const LeaderlessStudy = z
  .object({
    studyId: z.uuid(),
    createdAt: z.iso.datetime(),
    members: z.array(
      z.object({
        userId: z.string(),
        name: z.string(),
        email: z.string(),
        role: StudyRole,
        active: z.boolean(),
      }),
    ),
  })
  .meta({ id: 'LeaderlessStudy' });
export type LeaderlessStudy = z.infer<typeof LeaderlessStudy>;

export const LeaderlessList = listOf(LeaderlessStudy);
export type LeaderlessList = z.infer<typeof LeaderlessList>;

export const NewLead = z.strictObject({ studyId: z.uuid(), userId: z.string() }).meta({ id: 'NewLead' });
export type NewLead = z.infer<typeof NewLead>;

const LibraryCode = z
  .string()
  .trim()
  .regex(/^[A-Z0-9-]{2,12}$/, 'A code has 2 to 12 capital letters, digits or hyphens.');

/** A vehicle of the library has a name: a study shows it wherever the vehicle counts. */
const NamedVehicle = VehicleInput.refine((vehicle) => (vehicle.name ?? '').trim() !== '', {
  path: ['name'],
  error: 'Give the vehicle a name.',
});

export const LibraryVehicleInput = z
  .strictObject({ code: LibraryCode, vehicle: NamedVehicle })
  .meta({ id: 'LibraryVehicleInput' });
export type LibraryVehicleInput = z.infer<typeof LibraryVehicleInput>;

export const LibraryVehiclePatch = z
  .strictObject({
    code: LibraryCode.optional(),
    vehicle: NamedVehicle.optional(),
    archived: z.boolean().optional(),
    version: z.int().optional(),
  })
  .meta({ id: 'LibraryVehiclePatch' });
export type LibraryVehiclePatch = z.infer<typeof LibraryVehiclePatch>;

/** A mail the app sent or tries to send. Its text is kept only until it is sent: it may carry a link. */
export const MailEntry = z
  .object({
    id: z.uuid(),
    to: z.string(),
    subject: z.string(),
    state: z.enum(['queued', 'sent', 'failed']),
    attempts: z.int(),
    error: z.string().nullable(),
    createdAt: z.iso.datetime(),
    sentAt: z.iso.datetime().nullable(),
  })
  .meta({ id: 'MailEntry' });
export type MailEntry = z.infer<typeof MailEntry>;

/** A mail that stayed here because no mail server is set. */
export const KeptMail = z
  .object({
    id: z.uuid(),
    from: z.string(),
    to: z.array(z.string()),
    subject: z.string(),
    text: z.string(),
    receivedAt: z.iso.datetime(),
  })
  .meta({ id: 'KeptMail' });
export type KeptMail = z.infer<typeof KeptMail>;

/** `kept` is the outbox; `sent` the log of what was sent or is still tried. */
export const Outbox = z
  .object({
    mailServer: z.boolean(),
    kept: listOf(KeptMail),
    sent: listOf(MailEntry),
  })
  .meta({ id: 'Outbox' });
export type Outbox = z.infer<typeof Outbox>;
