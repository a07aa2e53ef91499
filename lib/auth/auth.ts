import "server-only";
import { drizzleAdapter } from "better-auth/adapters/drizzle";
import { createAuthMiddleware, getSessionFromCtx, isAPIError } from "better-auth/api";
import { betterAuth } from "better-auth/minimal";
import { nextCookies } from "better-auth/next-js";
import { organization } from "better-auth/plugins/organization";
import { getDb, type Database } from "@/lib/db/client";
import { newId } from "@/lib/db/ids";
import { log } from "@/lib/db/log";
import { listMemberships } from "@/lib/db/membership";
import * as schema from "@/lib/db/schema/auth";
import {
  alreadyRegisteredMessage,
  invitationMessage,
  resetMessage,
  verifyMessage,
} from "@/lib/email/account-messages";
import { sendMail, sendMailLater } from "@/lib/email/transport";
import { PASSWORD_MAX, PASSWORD_MIN } from "@/lib/schemas/account";
import { accessControl, teamRoles } from "./access-control";
import { emailOf, forgiveSignIns, limitAccount } from "./account-limits";
import { authSecret, baseUrl, clientAddressHeader, rateLimitsOn, secureCookies } from "./environment";
import { auditMemberChange, teamAudit } from "./team-audit";
import { requireOneKnownRole, requireTeamRead } from "./team-guard";

const HOUR_S = 3600;
const DAY_S = 24 * HOUR_S;
const INVITATION_DAYS = 7;

export type Auth = ReturnType<typeof createAuth>;

const holder = globalThis as typeof globalThis & { ringfenceAuth?: { db: Database; auth: Auth } };

/** Who signs in, and who belongs to which team; made at first use, on the process's one database. */
export async function getAuth(): Promise<Auth> {
  const db = await getDb();
  if (holder.ringfenceAuth?.db !== db) holder.ringfenceAuth = { db, auth: createAuth(db) };
  return holder.ringfenceAuth.auth;
}

function createAuth(db: Database) {
  return betterAuth({
    appName: "Ringfence",
    baseURL: baseUrl(),
    secret: authSecret(),
    // Units of work are batches of the write queue; interactive transactions are refused there.
    database: drizzleAdapter(db, { provider: "sqlite", schema, transaction: false }),
    telemetry: { enabled: false },
    logger: {
      level: "warn",
      log: (level, message, ...args) => log()[level === "error" ? "error" : "warn"]({ args }, message),
    },
    onAPIError: {
      // What was refused is for the person who asked; only what failed is for whoever runs this.
      onError: (error) => {
        if (!isAPIError(error) || error.status === "INTERNAL_SERVER_ERROR")
          log().error({ err: error }, "Sign-in failed");
      },
    },
    emailAndPassword: {
      enabled: true,
      requireEmailVerification: true,
      minPasswordLength: PASSWORD_MIN,
      maxPasswordLength: PASSWORD_MAX,
      resetPasswordTokenExpiresIn: HOUR_S,
      revokeSessionsOnPasswordReset: true,
      sendResetPassword: async ({ user, url }) => sendMailLater(resetMessage(user.email, user.name, url)),
      onPasswordReset: ({ user }) => forgiveSignIns(user.email),
      onExistingUserSignUp: async ({ user }) =>
        sendMailLater(
          alreadyRegisteredMessage(user.email, user.name, user.emailVerified, `${baseUrl()}/forgot`),
        ),
    },
    emailVerification: {
      sendOnSignUp: true,
      autoSignInAfterVerification: true,
      expiresIn: HOUR_S,
      sendVerificationEmail: async ({ user, url }) =>
        sendMailLater(verifyMessage(user.email, user.name, url)),
    },
    session: {
      expiresIn: 7 * DAY_S,
      updateAge: DAY_S,
      // A revoked session or a changed role holds at once: every request reads the database.
      cookieCache: { enabled: false },
    },
    verification: { storeIdentifier: "hashed" },
    rateLimit: { enabled: rateLimitsOn(), storage: "database", window: 60, max: 120 },
    advanced: {
      // Said aloud: left unsaid, the package drops both checks wherever NODE_ENV is "test".
      disableCSRFCheck: false,
      disableOriginCheck: false,
      useSecureCookies: secureCookies(),
      ipAddress: { ipAddressHeaders: [clientAddressHeader()] },
      database: { generateId: () => newId() },
    },
    databaseHooks: {
      session: {
        create: {
          before: async (session) => {
            const [first] = await listMemberships(session.userId);
            return { data: { ...session, activeOrganizationId: first?.teamId ?? null } };
          },
        },
      },
    },
    hooks: {
      before: createAuthMiddleware(async (ctx) => {
        requireOneKnownRole(ctx.path, ctx.body);
        await limitAccount(ctx.path, ctx.body);
        if (!ctx.path.startsWith("/organization/") || !ctx.headers) return;
        const found = await getSessionFromCtx<
          Record<string, unknown>,
          { activeOrganizationId?: string | null }
        >(ctx);
        if (found)
          await requireTeamRead(
            ctx.path,
            found.user.id,
            ctx.query,
            found.session.activeOrganizationId ?? null,
          );
      }),
      after: createAuthMiddleware(async (ctx) => {
        const email = emailOf(ctx.body);
        if (ctx.path === "/sign-in/email" && email !== null && ctx.context.newSession)
          await forgiveSignIns(email);
        const user = ctx.context.session?.user;
        if (user) await auditMemberChange(ctx.path, user, ctx.context.returned);
      }),
    },
    plugins: [
      organization({
        ac: accessControl,
        roles: teamRoles,
        creatorRole: "owner",
        requireEmailVerificationOnInvitation: true,
        disableOrganizationDeletion: true,
        cancelPendingInvitationsOnReInvite: false,
        invitationExpiresIn: INVITATION_DAYS * DAY_S,
        organizationLimit: 20,
        membershipLimit: 500,
        organizationHooks: teamAudit,
        sendInvitationEmail: async ({ id, email, role, organization: team, inviter }) =>
          sendMail(
            invitationMessage(email, {
              inviterName: inviter.user.name,
              teamName: team.name,
              role,
              days: INVITATION_DAYS,
              url: `${baseUrl()}/invitation/${id}`,
            }),
          ),
      }),
      nextCookies(),
    ],
  });
}
