import type { APIContext } from 'astro';
import { readForm } from '@/features/http/form';
import { takeTurn, type Turn } from '@/features/limits/limits.server';
import { addressFault, EMAIL_SENTENCE, emailKey } from './email-key';
import { formFaults, seeOther, type FormFaults } from './form-outcome';
import { judgePassword } from './password-rule';
import { acceptInvitation, readInvitation } from './invitations.server';
import { findByEmail } from './people.server';
import { returnPath } from './return-path';
import { beginSession, sendSignInLink, signInWithLink, signInWithPassword } from './session.server';
import { askToSignUp, confirmSignUp, readSignUp } from './sign-up.server';

/**
 * The forms of someone who is not signed in. Each gives the response to send, or what its page shows again.
 * None of them tells whether an address is known.
 */
type Context = Pick<APIContext, 'request' | 'url' | 'cookies' | 'clientAddress'>;
type Outcome = Promise<Response | FormFaults>;

const NO_FORM = formFaults(400, { '': 'What was sent does not read. Load the page anew and try again.' });
const tooOften = ({ sentence }: Turn & { ok: false }, typed: FormFaults['typed']) =>
  formFaults(429, { '': sentence }, typed);

/** POST /sign-in: with a password, or with the button that sends a link. */
export async function postSignIn(context: Context): Outcome {
  const field = await readForm(context.request);
  if (!field) return NO_FORM;
  const email = field('email');
  const typed = { email, to: field('to') };
  const key = emailKey(email);
  if (!key) return formFaults(422, { email: EMAIL_SENTENCE }, typed);
  if (field('with') === 'link') return sendLink(context, key, typed);
  if (!field('password'))
    return formFaults(422, { password: 'Type your password, or have a link sent instead.' }, typed);

  const turn = await takeTurn('sign-in', { ip: context.clientAddress, emailKey: key });
  if (!turn.ok) return formFaults(429, { '': `${turn.sentence} A sign-in link still works.` }, typed);
  const signedIn = await signInWithPassword(context, { email: key, password: field('password') });
  if (!signedIn.ok) return formFaults(401, { '': 'That address and password do not belong together.' }, typed);
  await turn.giveBack();
  return seeOther(returnPath(typed.to, homeOf(key)));
}

async function sendLink(context: Context, key: string, typed: { email: string; to: string }): Outcome {
  const fault = addressFault(key);
  if (fault) return formFaults(422, { email: fault }, typed);
  const turn = await takeTurn('sign-in-link', { ip: context.clientAddress, emailKey: key });
  if (!turn.ok) return tooOften(turn, typed);
  await sendSignInLink(context, { email: key, to: returnPath(typed.to) });
  return seeOther('/sign-in/sent');
}

/** POST /sign-in/confirm: the button behind the link in the letter. */
export async function postSignInLink(context: Context): Outcome {
  const field = await readForm(context.request);
  if (!field) return NO_FORM;
  const key = emailKey(field('email'));
  if (!key) return formFaults(400, { '': LINK_GONE });
  const turn = await takeTurn('use-link', { ip: context.clientAddress, emailKey: key });
  if (!turn.ok) return tooOften(turn, {});
  const signedIn = await signInWithLink(context, { email: key, token: field('token') });
  if (!signedIn.ok) return formFaults(400, { '': LINK_GONE });
  return seeOther(returnPath(field('to'), homeOf(key)));
}

const LINK_GONE = 'This link no longer works: it is older than a quarter of an hour, or it was used already.';

/** POST /sign-up */
export async function postSignUp(context: Context): Outcome {
  const field = await readForm(context.request);
  if (!field) return NO_FORM;
  const typed = { name: field('name').trim(), email: field('email').trim() };
  const key = emailKey(typed.email);
  const fault = addressFault(typed.email);
  const password = judgePassword(field('password'), typed);
  const faults = {
    ...nameFault(typed.name),
    ...(fault ? { email: fault } : {}),
    ...(password.ok ? {} : { password: password.sentence }),
  };
  if (!key || Object.keys(faults).length > 0) return formFaults(422, faults, typed);
  const turn = await takeTurn('sign-up', { ip: context.clientAddress, emailKey: key });
  if (!turn.ok) return tooOften(turn, typed);
  await askToSignUp(context, { ...typed, password: field('password') });
  return seeOther('/sign-up/sent');
}

/** POST /sign-up/confirm */
export async function postSignUpConfirm(context: Context): Outcome {
  const field = await readForm(context.request);
  if (!field) return NO_FORM;
  const pending = await readSignUp(context, field('token'));
  const turn = await takeTurn('use-link', {
    ip: context.clientAddress,
    emailKey: emailKey(pending?.email ?? '') ?? undefined,
  });
  if (!turn.ok) return tooOften(turn, {});
  const outcome = await confirmSignUp(context, field('token'), field('password'));
  if (outcome.ok) {
    await beginSession(context, outcome.person, 'password');
    return seeOther('/account?welcome');
  }
  if (outcome.code === 'wrong password')
    return formFaults(401, { password: 'That is not the password that you chose when you signed up.' });
  if (outcome.code === 'known') return seeOther('/sign-in');
  return formFaults(400, { '': 'This link no longer works: it is older than a day, or not complete. Sign up again.' });
}

/** POST /sign-up/invitation */
export async function postInvitation(context: Context): Outcome {
  const field = await readForm(context.request);
  if (!field) return NO_FORM;
  const turn = await takeTurn('use-link', {
    ip: context.clientAddress,
    emailKey: emailKey(field('email')) ?? undefined,
  });
  if (!turn.ok) return tooOften(turn, {});
  const link = { email: field('email'), token: field('token') };
  const typed = { name: field('name').trim() };
  const invitation = readInvitation(link.email, link.token);
  if (invitation && !invitation.person) {
    const password = judgePassword(field('password'), { ...typed, email: link.email });
    const faults = { ...nameFault(typed.name), ...(password.ok ? {} : { password: password.sentence }) };
    if (Object.keys(faults).length > 0) return formFaults(422, faults, typed);
  }
  const accepted = await acceptInvitation(link, { ...typed, password: field('password') });
  if (!accepted.ok) return formFaults(400, { '': accepted.sentence }, typed);
  await beginSession(context, accepted.person, 'link');
  return seeOther('/workroom');
}

export const NAME_MOST = 80;

export function nameFault(name: string): Record<string, string> {
  if (name === '') return { name: 'Say what to call you. It stands under what you publish or ask.' };
  if ([...name].length > NAME_MOST) return { name: `At most ${NAME_MOST} characters.` };
  return /[\p{Cc}\p{Cf}]/u.test(name) ? { name: 'The name holds characters that cannot be seen. Type it anew.' } : {};
}

const homeOf = (key: string): string => (findByEmail(key)?.role === 'reader' ? '/projects' : '/workroom');
