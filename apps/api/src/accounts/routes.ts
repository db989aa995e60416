import {
  AccountView,
  AskReset,
  AskVerifyAgain,
  ChangeDetails,
  DeviceKeyView,
  ResetPassword,
  SignedIn,
  SignIn,
  SignUp,
  VerifyEmail,
} from '@mereward/shared/accounts/contract';
import { Problem } from '@mereward/shared/problems/problem';
import type { Request, Response } from 'express';
import { accountOf } from '../ctx';
import { limitSecrets, limitWrongTries, limitWrongTriesAtOne } from '../http/limits';
import { fromOurPage } from '../http/our-page';
import { parse } from '../http/parse';
import { deed, raw, read, type Route } from '../http/route';
import { serverOf } from '../http/server';
import { ACCESS_TOKEN_S, signAccessToken } from '../http/session';
import { inOpenTransaction, inTransaction } from '../http/transaction';
import { deviceKey } from './device-key';
import { passwordFits, passwordHash } from './password';
import { accountView } from './queries';
import { clearRefreshCookie, refreshTokenOf, setRefreshCookie } from './refresh-cookie';
import { askReset, resetPassword } from './reset-password';
import { changeDetails } from './service';
import {
  endEverySignIn,
  knownBy,
  openSignIn,
  renewSignIn,
  signOut,
  wrongPassword,
  type Opened,
} from './sign-in';
import { signUp, verifyAgain, verifyEmail } from './sign-up';

/** The refresh token goes into the cookie, the rest to the page. */
async function answerSignedIn(req: Request, res: Response, opened: Opened): Promise<void> {
  const { config, clock, source } = serverOf(req);
  setRefreshCookie(res, config, opened.refreshToken);
  const body: SignedIn = {
    accessToken: signAccessToken(config, opened.accountId, clock()),
    expiresInS: ACCESS_TOKEN_S,
    account: await accountView(source.manager, opened.accountId),
  };
  res.set('Cache-Control', 'no-store').json(body);
}

// Hashing a password is slow on purpose and waits its turn: it stands before the transaction, never in one.
const forPasswords: Route[] = [
  raw(
    {
      method: 'post',
      path: '/accounts',
      summary: 'Make an account; a link to confirm the address is mailed',
      signIn: 'open',
      body: SignUp,
      status: 202,
      guards: [limitSecrets],
    },
    async (req, res) => {
      const { password, ...input } = parse(SignUp, req.body);
      const hash = await passwordHash(password);
      await inOpenTransaction(req, (ctx) => signUp(ctx, { ...input, passwordHash: hash }));
      res.status(202).end();
    },
  ),
  raw(
    {
      method: 'post',
      path: '/accounts/reset',
      summary: 'Choose a new password by a mailed link; every sign-in ends',
      signIn: 'open',
      body: ResetPassword,
      guards: [limitWrongTries],
    },
    async (req, res) => {
      const { token, password } = parse(ResetPassword, req.body);
      const hash = await passwordHash(password);
      await inOpenTransaction(req, (ctx) => resetPassword(ctx, { token, passwordHash: hash }));
      res.status(204).end();
    },
  ),
  raw(
    {
      method: 'post',
      path: '/accounts/session',
      summary: 'Sign in; the refresh token comes as a cookie',
      signIn: 'open',
      body: SignIn,
      answer: SignedIn,
      guards: [limitWrongTries, limitWrongTriesAtOne],
    },
    async (req, res) => {
      const { email, password } = parse(SignIn, req.body);
      const account = await knownBy(serverOf(req).source.manager, email);
      const fits = await passwordFits(account?.passwordHash ?? null, password);
      if (!account || !fits) throw wrongPassword();
      await answerSignedIn(req, res, await inOpenTransaction(req, (ctx) => openSignIn(ctx, account)));
    },
  ),
];

const forSessions: Route[] = [
  raw(
    {
      method: 'post',
      path: '/accounts/session/refresh',
      summary: 'A new access token by the cookie, which is renewed too; needs the header X-Mereward: 1',
      signIn: 'open',
      answer: SignedIn,
      guards: [fromOurPage],
    },
    async (req, res) => {
      const token = refreshTokenOf(req);
      const opened = token ? await inOpenTransaction(req, (ctx) => renewSignIn(ctx, token)) : null;
      if (opened) return answerSignedIn(req, res, opened);
      clearRefreshCookie(res, serverOf(req).config);
      throw new Problem('not-signed-in', 'You are not signed in', { detail: 'Sign in to go on.' });
    },
  ),
  raw(
    {
      method: 'delete',
      path: '/accounts/session',
      summary: 'Sign out here; needs the header X-Mereward: 1',
      signIn: 'open',
      guards: [fromOurPage],
    },
    async (req, res) => {
      const token = refreshTokenOf(req);
      if (token) await inOpenTransaction(req, (ctx) => signOut(ctx, token));
      clearRefreshCookie(res, serverOf(req).config);
      res.status(204).end();
    },
  ),
  raw(
    {
      method: 'delete',
      path: '/accounts/sessions',
      summary: 'Sign out everywhere; needs the header X-Mereward: 1',
      signIn: 'needed',
      guards: [fromOurPage],
    },
    async (req, res) => {
      await inTransaction(req, (ctx) => endEverySignIn(ctx, accountOf(ctx.actor)));
      clearRefreshCookie(res, serverOf(req).config);
      res.status(204).end();
    },
  ),
];

const forDetails: Route[] = [
  deed(
    {
      method: 'post',
      path: '/accounts/verify',
      summary: 'Confirm an address by a mailed link',
      signIn: 'open',
      body: VerifyEmail,
      guards: [limitWrongTries],
    },
    (ctx, { body }) => verifyEmail(ctx, body.token),
  ),
  deed(
    {
      method: 'post',
      path: '/accounts/verify-again',
      summary: 'Mail the link to confirm an address again',
      signIn: 'open',
      body: AskVerifyAgain,
      status: 202,
      guards: [limitSecrets],
    },
    (ctx, { body }) => verifyAgain(ctx, body.email),
  ),
  deed(
    {
      method: 'post',
      path: '/accounts/reset-request',
      summary: 'Mail a link to choose a new password',
      signIn: 'open',
      body: AskReset,
      status: 202,
      guards: [limitSecrets],
    },
    (ctx, { body }) => askReset(ctx, body.email),
  ),
  read(
    {
      method: 'get',
      path: '/accounts/me',
      summary: 'The account that asks',
      signIn: 'needed',
      answer: AccountView,
    },
    (ctx) => accountView(ctx.tx, accountOf(ctx.actor)),
  ),
  deed(
    {
      method: 'patch',
      path: '/accounts/me',
      summary: 'Change name and units',
      signIn: 'needed',
      body: ChangeDetails,
      answer: AccountView,
    },
    (ctx, { body }) => changeDetails(ctx, body),
  ),
  deed(
    {
      method: 'post',
      path: '/accounts/me/device-key',
      summary: 'The key with which this account’s phones seal what they have still to send',
      signIn: 'needed',
      answer: DeviceKeyView,
    },
    (ctx) => deviceKey(ctx),
  ),
];

export const accountRoutes: readonly Route[] = [...forPasswords, ...forSessions, ...forDetails];
