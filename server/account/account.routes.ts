import { desc } from 'drizzle-orm';
import * as api from '#shared/account/account.api.ts';
import { Refusal } from '#shared/kernel/refusal.ts';
import type { Feature } from '../platform/features.ts';
import { mount } from '../platform/mount.ts';
import { outgoingMails } from '../platform/platform.table.ts';
import { endSession, renewSession, saveSession } from '../platform/session.ts';
import * as account from './account.service.ts';
import * as members from './members.service.ts';
import { hashPassword } from './password.ts';
import { organisationToOpen, sessionReply } from './session-reply.ts';

const done = { done: true as const };

export const accountRoutes: Feature = (router, platform) => {
  const { config, throttles } = platform;

  mount(router, platform, api.getSession, ({ db, actor }) => sessionReply(db, actor, config.outbox));

  // Throttles and hashing come before any transaction.
  mount(
    router,
    platform,
    api.signIn,
    async ({ db, body, request }) => {
      await throttles.spend('signInAddress', request.ip ?? '');
      await throttles.spend('signInEmail', body.email);
      const found = await account.accountOf(db, body);
      const orgId = await organisationToOpen(db, found.id, body.orgId);
      if (!orgId) throw new Refusal('forbidden', 'This account belongs to no organisation.');
      await throttles.forgive('signInEmail', body.email);
      await renewSession(request, { accountId: found.id, orgId });
      return sessionReply(db, { accountId: found.id, orgId }, config.outbox);
    },
    { transaction: false },
  );

  mount(
    router,
    platform,
    api.signOut,
    async ({ request, response }) => {
      await endSession(request);
      response.clearCookie('tb_session');
      return done;
    },
    { transaction: false },
  );

  mount(
    router,
    platform,
    api.signOutEverywhere,
    async ({ db, actor, request, response }) => {
      await endSession(request);
      await account.endSessions(db, actor.accountId);
      response.clearCookie('tb_session');
      return done;
    },
    { transaction: false },
  );

  mount(
    router,
    platform,
    api.chooseOrganisation,
    async ({ db, actor, body, request }) => {
      const orgId = await organisationToOpen(db, actor.accountId, body.orgId);
      if (!orgId) throw new Refusal('missing', 'You are not a member of this organisation.');
      request.session.orgId = orgId;
      await saveSession(request);
      return sessionReply(db, { accountId: actor.accountId, orgId }, config.outbox);
    },
    { transaction: false },
  );

  mount(
    router,
    platform,
    api.askPasswordReset,
    async ({ db, body, request, after }) => {
      await throttles.spend('passwordReset', request.ip ?? '');
      await throttles.spend('passwordReset', body.email);
      await db.transaction((tx) => account.askReset(tx, body.email, platform.publicUrl()));
      after(platform.deliverMail);
      return done;
    },
    { transaction: false },
  );

  mount(
    router,
    platform,
    api.resetPassword,
    async ({ db, body, request }) => {
      await throttles.spend('passwordReset', request.ip ?? '');
      const passwordHash = await hashPassword(body.password);
      await db.transaction((tx) => account.useResetLink(tx, body.token, passwordHash));
      return done;
    },
    { transaction: false },
  );

  mount(
    router,
    platform,
    api.changePassword,
    async ({ db, actor, body, request }) => {
      await throttles.spend('signInEmail', actor.accountId);
      await account.changeOwnPassword(db, {
        accountId: actor.accountId,
        sessionId: request.session.id,
        ...body,
      });
      await throttles.forgive('signInEmail', actor.accountId);
      return done;
    },
    { transaction: false },
  );

  mount(router, platform, api.listMembers, async ({ db, actor }) => ({
    members: await members.listMembers(db, actor.orgId),
  }));
  mount(router, platform, api.inviteMember, async ({ db, actor, params, body, after }) => {
    const member = await members.inviteMember(db, actor, {
      ...body,
      id: params.id,
      publicUrl: platform.publicUrl(),
    });
    after(platform.deliverMail);
    return member;
  });
  mount(router, platform, api.changeMemberRole, ({ db, actor, params, body }) =>
    members.changeRole(db, actor, params.id, body.role),
  );
  mount(router, platform, api.removeMember, async ({ db, actor, params }) => {
    await members.removeMember(db, actor, params.id);
    return done;
  });

  mount(router, platform, api.readOutbox, async ({ db, request }) => {
    // Mail holds links that sign people in: only somebody at this machine may read it, and nobody where a mail host sends it.
    const here =
      ['127.0.0.1', '::1', '::ffff:127.0.0.1'].includes(request.socket.remoteAddress ?? '') &&
      config.trustProxy === 0;
    if (!config.outbox || !here) throw new Refusal('missing', 'There is no outbox to read here.');
    const rows = await db.select().from(outgoingMails).orderBy(desc(outgoingMails.createdAt)).limit(100);
    return {
      mails: rows.map(({ id, recipient, subject, body, createdAt, status }) => ({
        id,
        to: recipient,
        subject,
        text: body,
        createdAt: createdAt.toISOString(),
        status,
      })),
    };
  });
};
