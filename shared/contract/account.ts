/**
 * Accounts, sign-in, invitations and the first administrator.
 */
import { z } from 'zod';
import {
  idSchema,
  isoInstantSchema,
  pageOf,
  pageQuerySchema,
  requiredLineOf,
  textOf,
  versionSchema,
} from './common';
import { roleSchema } from './roles';

export const emailSchema = z
  .string()
  .trim()
  .toLowerCase()
  .max(254)
  .pipe(z.email('This is not an e-mail address'));

/** At least 15 characters, no composition rules (NIST SP 800-63B-4, as quoted by OWASP); pasting is fine. */
export const PASSWORD_MIN_LENGTH = 15;
export const newPasswordSchema = z
  .string()
  .min(PASSWORD_MIN_LENGTH, `Use at least ${PASSWORD_MIN_LENGTH} characters; a few words are good`)
  .max(200, 'Use at most 200 characters');

export const ACCOUNT_STATUSES = ['invited', 'active', 'disabled'] as const;
const rolesSchema = z.array(roleSchema).min(1, 'Choose at least one role');

export const accountSchema = z.object({
  id: idSchema,
  email: emailSchema,
  displayName: z.string(),
  roles: z.array(roleSchema),
  status: z.enum(ACCOUNT_STATUSES),
  lastSignInAt: isoInstantSchema.nullable(),
  version: versionSchema,
});
export type Account = z.infer<typeof accountSchema>;
export const accountPageSchema = pageOf(accountSchema);

/** The signed-in person, as the client keeps it. */
export const sessionUserSchema = accountSchema.pick({
  id: true,
  email: true,
  displayName: true,
  roles: true,
});
export type SessionUser = z.infer<typeof sessionUserSchema>;

export const signInSchema = z.object({
  email: emailSchema,
  password: z.string().min(1, 'Password is missing').max(200),
});
export const sessionSchema = z.object({
  accessToken: z.string(),
  /** Seconds until the access token ends. */
  expiresInS: z.number(),
  user: sessionUserSchema,
});
export type Session = z.infer<typeof sessionSchema>;

export const invitationSchema = z.object({
  email: emailSchema,
  displayName: requiredLineOf(100, 'Name'),
  roles: rolesSchema,
});
export const accountChangeSchema = z.object({
  displayName: requiredLineOf(100, 'Name'),
  roles: rolesSchema,
  status: z.enum(ACCOUNT_STATUSES),
});

export const resetRequestSchema = z.object({ email: emailSchema });
/** What the page behind an invitation or reset link may know before the password is set. */
export const passwordLinkSchema = z.object({
  kind: z.enum(['invitation', 'reset']),
  email: emailSchema,
  displayName: z.string(),
  expiresAt: isoInstantSchema,
});
export const passwordFromLinkSchema = z.object({ password: newPasswordSchema });

export const firstAdministratorSchema = z.object({
  code: requiredLineOf(40, 'Code'),
  email: emailSchema,
  displayName: requiredLineOf(100, 'Name'),
  password: newPasswordSchema,
});

export const practiceSchema = z.object({
  name: z.string(),
  /** True when the data are invented: every screen says so. */
  isDemo: z.boolean(),
  needsFirstAdministrator: z.boolean(),
  /** E-mail and password of the demo accounts; empty outside the demo. */
  demoAccounts: z.array(
    z.object({
      email: z.string(),
      password: z.string(),
      displayName: z.string(),
      roles: z.array(roleSchema),
    }),
  ),
});
export type Practice = z.infer<typeof practiceSchema>;

/** A mail kept by the local fake of the mail service. */
export const outboxMailSchema = z.object({
  id: idSchema,
  to: z.string(),
  subject: z.string(),
  text: textOf(20_000),
  sentAt: isoInstantSchema,
});
export type OutboxMail = z.infer<typeof outboxMailSchema>;
export const outboxPageSchema = pageOf(outboxMailSchema);

export const auditEntrySchema = z.object({
  id: z.number().int(),
  at: isoInstantSchema,
  actorId: idSchema.nullable(),
  actorName: z.string(),
  /** `patient.create`, `plan.sign`, `session.refused` … */
  action: z.string(),
  noun: z.string(),
  nounId: z.string().nullable(),
  patientId: idSchema.nullable(),
  version: z.number().int().nullable(),
  requestId: z.string().nullable(),
  detail: z.record(z.string(), z.unknown()),
});
export type AuditEntry = z.infer<typeof auditEntrySchema>;
export const auditPageSchema = pageOf(auditEntrySchema);
export const auditQuerySchema = pageQuerySchema.extend({
  noun: z.string().max(40).optional(),
  nounId: z.string().max(60).optional(),
  patientId: idSchema.optional(),
  actorId: idSchema.optional(),
});
export type AuditQuery = z.infer<typeof auditQuerySchema>;
