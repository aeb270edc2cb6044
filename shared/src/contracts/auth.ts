import { z } from 'zod';
import { TEAM_ROLES } from './words.ts';

const password = z.string().min(10, 'at least 10 characters').max(200);

export const signInRequest = z.strictObject({
  email: z.string().trim().toLowerCase().max(200),
  password: z.string().max(200),
});
export type SignInRequest = z.output<typeof signInRequest>;

export const meResponse = z.object({
  id: z.uuid(),
  email: z.string(),
  name: z.string(),
  isAdministrator: z.boolean(),
  teams: z.array(z.object({ id: z.uuid(), name: z.string(), role: z.enum(TEAM_ROLES) })),
});
export type Me = z.output<typeof meResponse>;

export const TOKEN_SCOPES = ['read', 'write'] as const;
export const createTokenRequest = z.strictObject({
  name: z.string().trim().min(1).max(100),
  scope: z.enum(TOKEN_SCOPES).default('read'),
  expiresInDays: z.int().min(1).max(366).default(90),
});
export type CreateTokenRequest = z.output<typeof createTokenRequest>;
export const personalToken = z.object({
  id: z.uuid(),
  name: z.string(),
  scope: z.enum(TOKEN_SCOPES),
  createdAt: z.iso.datetime(),
  expiresAt: z.iso.datetime(),
  lastUsedAt: z.iso.datetime().nullable(),
});
export const createdToken = personalToken.extend({ /** Shown this once. */ token: z.string() });

export const changePasswordRequest = z.strictObject({ current: z.string().max(200), next: password });
export type ChangePasswordRequest = z.output<typeof changePasswordRequest>;

/** A team; with `leadEmail` its first lead is invited, without it whoever makes the team leads it. */
export const createTeamRequest = z.strictObject({
  name: z.string().trim().min(1).max(100),
  leadEmail: z.email().max(200).toLowerCase().optional(),
});
export type CreateTeamRequest = z.output<typeof createTeamRequest>;
export const team = z.object({ id: z.uuid(), name: z.string(), role: z.enum(TEAM_ROLES).nullable(), members: z.int() });
export const teamMember = z.object({ userId: z.uuid(), name: z.string(), email: z.string(), role: z.enum(TEAM_ROLES) });
export const invitationRequest = z.strictObject({ email: z.email().max(200).toLowerCase(), role: z.enum(TEAM_ROLES) });
export type InvitationRequest = z.output<typeof invitationRequest>;
export const updateMemberRequest = z.strictObject({ role: z.enum(TEAM_ROLES) });
export type UpdateMemberRequest = z.output<typeof updateMemberRequest>;
export const invitation = z.object({
  id: z.uuid(),
  email: z.string(),
  role: z.enum(TEAM_ROLES),
  expiresAt: z.iso.datetime(),
  acceptedAt: z.iso.datetime().nullable(),
});
export const acceptInvitationRequest = z.strictObject({
  token: z.string().min(10).max(200),
  name: z.string().trim().min(1).max(100),
  password,
});
export type AcceptInvitationRequest = z.output<typeof acceptInvitationRequest>;
/** What the holder of an invitation's link sees before accepting. */
export const invitationPreview = z.object({
  teamName: z.string(),
  email: z.string(),
  role: z.enum(TEAM_ROLES),
  /** The e-mail has an account already: its own password joins the team. */
  hasAccount: z.boolean(),
});
export const outboxMail = z.object({
  id: z.uuid(),
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  state: z.enum(['queued', 'sent', 'kept', 'failed']),
  error: z.string().nullable(),
  createdAt: z.iso.datetime(),
});
