import { defineAction, ActionError, type ActionAPIContext } from 'astro:actions';
import { z } from 'astro:schema';
import { CONVENTIONS, type Conventions } from '../lessons/conventions.ts';
import { Person, withTransaction } from '../server/database/index.ts';
import { log } from '../server/log.ts';
import {
  changePassword,
  confirmEmailChange,
  deleteAccount,
  requestEmailChange,
  requestReset,
  resetPassword,
  sendVerification,
  signInWithPassword,
  signUp,
  tidyEmail,
  verifyEmail,
} from '../server/sign-in/account.ts';
import { isKnownDevice, rememberDevice } from '../server/sign-in/devices.ts';
import { passwordFault } from '../server/sign-in/password.ts';
import { COOKIE, createSession, endSession, endSessions } from '../server/sign-in/sessions.ts';
import { afterFailure, afterSuccess, beforeTry, mayAsk } from '../server/sign-in/throttle.ts';

/** The forms of signing in and of one's own account. An answer that could tell who has an account is the same for all. */
const email = z
  .string()
  .max(254, 'An e-mail address has at most 254 characters.')
  .transform(tidyEmail)
  .pipe(z.string().email('Put an @ and a domain into the address.'));
const typed = z.string().max(1024);
const token = z.string().max(200);
const displayName = z.string().trim().min(1, 'Write the name that you want to be called.').max(120);
const HOUR_S = 3600;
type Options<K extends keyof Conventions> = [Conventions[K], ...Conventions[K][]];

/** What is wrong with one field, in the form that pages read: JSON of field names and sentences. */
function refuse(field: string, message: string): never {
  throw new ActionError({ code: 'BAD_REQUEST', message: JSON.stringify({ [field]: message }) });
}

function tooMany(seconds: number): never {
  const form = `Too many tries. Wait ${seconds} s, then try again.`;
  throw new ActionError({ code: 'TOO_MANY_REQUESTS', message: JSON.stringify({ form }) });
}

async function startSession(context: ActionAPIContext, personId: number): Promise<void> {
  const device = context.request.headers.get('user-agent') ?? '';
  const cookie = await createSession(personId, device, context.cookies.get(COOKIE)?.value);
  context.cookies.set(cookie.name, cookie.value, cookie.attributes);
}

function signedIn(context: ActionAPIContext) {
  const { person } = context.locals;
  if (!person)
    throw new ActionError({ code: 'UNAUTHORIZED', message: JSON.stringify({ form: 'Sign in first.' }) });
  return person;
}

export const people = {
  signUp: defineAction({
    accept: 'form',
    input: z.object({ displayName, email, password: typed }).strict(),
    handler: async (input, context) => {
      const fault = passwordFault(input.password, [input.email, input.displayName]);
      if (fault) refuse('password', fault);
      if (!(await mayAsk('sign-up', context.locals.clientAddress, 60, HOUR_S))) tooMany(HOUR_S);
      await signUp(input);
      log.info({ requestId: context.locals.requestId }, 'sign-up asked for');
      return { sent: true };
    },
  }),

  signIn: defineAction({
    accept: 'form',
    input: z.object({ email, password: typed, next: z.string().max(2000).optional() }).strict(),
    handler: async (input, context) => {
      const { requestId, clientAddress } = context.locals;
      const known = isKnownDevice(context.cookies, input.email);
      const throttle = await beforeTry(input.email, clientAddress, known);
      if (!throttle.allowed) {
        log.warn({ requestId }, 'sign-in slowed');
        tooMany(throttle.retryAfter_s);
      }
      if (throttle.wait_ms > 0) await new Promise((resolve) => setTimeout(resolve, throttle.wait_ms));
      const person = await signInWithPassword(input.email, input.password);
      if (!person) {
        await afterFailure(input.email);
        log.warn({ requestId }, 'sign-in failed');
        refuse('form', 'This address and password do not belong together.');
      }
      await afterSuccess(input.email);
      await startSession(context, person.id);
      rememberDevice(context.cookies, input.email);
      log.info({ requestId, person: person.publicId }, 'signed in');
      return { signedIn: true };
    },
  }),

  signOut: defineAction({
    accept: 'form',
    input: z.object({}).strict(),
    handler: async (_input, context) => {
      const cookie = await endSession(context.cookies.get(COOKIE)?.value);
      context.cookies.set(cookie.name, cookie.value, cookie.attributes);
      return { signedOut: true };
    },
  }),

  verify: defineAction({
    accept: 'form',
    input: z.object({ token }).strict(),
    handler: async (input) => {
      if ((await verifyEmail(input.token)) === null)
        refuse('form', 'This link was used already or is too old. Sign in and ask for a new one.');
      return { verified: true };
    },
  }),

  verifyAgain: defineAction({
    accept: 'form',
    input: z.object({}).strict(),
    handler: async (_input, context) => {
      const person = await Person.findByPk(signedIn(context).id, { rejectOnEmpty: true });
      if (person.emailVerifiedAt || !person.email) return { sent: true };
      if (!(await mayAsk('verify', person.publicId, 5, HOUR_S))) tooMany(HOUR_S);
      await withTransaction((transaction) => sendVerification(person, transaction));
      return { sent: true };
    },
  }),

  forgot: defineAction({
    accept: 'form',
    input: z.object({ email }).strict(),
    handler: async (input, context) => {
      const allowed =
        (await mayAsk('reset', input.email, 5, HOUR_S)) &&
        (await mayAsk('reset', `from ${context.locals.clientAddress}`, 100, HOUR_S));
      // Not awaited: how long the work takes would tell whether the address has an account.
      if (allowed)
        void requestReset(input.email).catch((error: unknown) => log.error({ err: error }, 'reset failed'));
      return { sent: true };
    },
  }),

  reset: defineAction({
    accept: 'form',
    input: z.object({ token, password: typed }).strict(),
    handler: async (input) => {
      const result = await resetPassword(input.token, input.password);
      if (!result.ok) refuse(result.field === 'token' ? 'form' : result.field, result.message);
      return { changed: true };
    },
  }),

  changePassword: defineAction({
    accept: 'form',
    input: z.object({ current: typed, password: typed }).strict(),
    handler: async (input, context) => {
      const result = await changePassword(
        signedIn(context).id,
        input.current,
        input.password,
        context.locals.sessionId,
      );
      if (!result.ok) refuse(result.field, result.message);
      return { changed: true };
    },
  }),

  changeEmail: defineAction({
    accept: 'form',
    input: z.object({ current: typed, email }).strict(),
    handler: async (input, context) => {
      const person = signedIn(context);
      if (!(await mayAsk('verify', person.publicId, 5, HOUR_S))) tooMany(HOUR_S);
      const result = await requestEmailChange(person.id, input.current, input.email);
      if (!result.ok) refuse(result.field, result.message);
      return { sent: true };
    },
  }),

  confirmEmailChange: defineAction({
    accept: 'form',
    input: z.object({ token }).strict(),
    handler: async (input) => {
      if (!(await confirmEmailChange(input.token)))
        refuse('form', 'This link was used already or is too old. Ask for a new one.');
      return { changed: true };
    },
  }),

  rename: defineAction({
    accept: 'form',
    input: z.object({ displayName }).strict(),
    handler: async (input, context) => {
      await Person.update({ displayName: input.displayName }, { where: { id: signedIn(context).id } });
      return { changed: true };
    },
  }),

  setConventions: defineAction({
    accept: 'form',
    input: z
      .object({
        decimal: z.enum(CONVENTIONS.decimal as Options<'decimal'>),
        concentration: z.enum(CONVENTIONS.concentration as Options<'concentration'>),
        volume: z.enum(CONVENTIONS.volume as Options<'volume'>),
        pH: z.enum(CONVENTIONS.pH as Options<'pH'>),
      })
      .strict(),
    handler: async (conventions, context) => {
      await Person.update({ conventions }, { where: { id: signedIn(context).id } });
      return conventions;
    },
  }),

  endSession: defineAction({
    accept: 'form',
    input: z.object({ session: z.string().max(40) }).strict(),
    handler: async (input, context) => {
      const which =
        input.session === 'others' ? { except: context.locals.sessionId } : { only: input.session };
      return { ended: await endSessions(signedIn(context).id, which) };
    },
  }),

  deleteAccount: defineAction({
    accept: 'form',
    input: z.object({ current: typed, sure: z.literal('yes') }).strict(),
    handler: async (input, context) => {
      const result = await deleteAccount(signedIn(context).id, input.current);
      if (!result.ok) refuse(result.field, result.message);
      const cookie = await endSession(undefined);
      context.cookies.set(cookie.name, cookie.value, cookie.attributes);
      return { deleted: true };
    },
  }),
};
