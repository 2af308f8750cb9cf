import type { APIContext } from 'astro';
import { emailKey } from '@/features/accounts/email-key';
import { formFaults, seeOther, type FormFaults } from '@/features/accounts/form-outcome';
import { readForm } from '@/features/http/form';
import { takeTurn } from '@/features/limits/limits.server';
import { preferencesSchema, signUpSchema, type SignUp } from './sign-up';
import { askToSubscribe, confirmSubscription, leave, savePreferences, undoLeaving } from './subscribers.server';

type Posted = Pick<APIContext, 'request' | 'clientAddress'>;

const NO_FORM = formFaults(400, { '': 'The form did not arrive whole. Fill it in once more.' });

export type Asked = { readonly ok: true } | { readonly ok: false; readonly seconds: number; readonly sentence: string };

/** One try to subscribe, counted by network and by address. */
export async function trySubscribing(signUp: SignUp, ip: string): Promise<Asked> {
  const turn = await takeTurn('subscribe', { ip, emailKey: emailKey(signUp.email) ?? '' });
  if (!turn.ok) return turn;
  askToSubscribe(signUp);
  return { ok: true };
}

/** The form in the footer and on /subscribe. Goes on to the page with the one answer, or says what does not fit. */
export async function postSubscribe({ request, clientAddress }: Posted): Promise<Response | FormFaults> {
  const field = await readForm(request);
  if (!field) return NO_FORM;
  const typed = { email: field('email'), units: field('units') || 'in' };
  const read = signUpSchema.safeParse({ ...typed, website: field('website') });
  if (!read.success) return formFaults(422, { email: read.error.issues[0]?.message ?? '' }, typed);
  const asked = await trySubscribing(read.data, clientAddress);
  return asked.ok ? seeOther('/subscribe?asked') : formFaults(429, { email: asked.sentence }, typed);
}

/** The button behind the link in the letter. */
export async function postConfirm({ request, clientAddress }: Posted): Promise<Response | FormFaults> {
  const field = await readForm(request);
  if (!field) return NO_FORM;
  const turn = await takeTurn('use-link', { ip: clientAddress });
  if (!turn.ok) return formFaults(429, { '': turn.sentence });
  const token = confirmSubscription(field('t'));
  if (!token) return formFaults(410, { '': 'This link has been used already, or is older than three days.' });
  await turn.giveBack();
  return seeOther(`/subscribe/preferences?${new URLSearchParams({ t: token, welcome: '1' })}`);
}

export async function postPreferences({
  request,
  url,
}: Pick<APIContext, 'request' | 'url'>): Promise<Response | FormFaults> {
  const field = await readForm(request);
  if (!field) return NO_FORM;
  const typed = { name: field('name'), units: field('units') };
  const read = preferencesSchema.safeParse(typed);
  if (!read.success) {
    const issue = read.error.issues[0];
    return formFaults(422, { [String(issue?.path[0] ?? '')]: issue?.message ?? '' }, typed);
  }
  const token = url.searchParams.get('t') ?? '';
  if (!savePreferences(token, read.data)) return formFaults(404, { '': 'This link belongs to nobody on the list.' });
  return seeOther(`/subscribe/preferences?${new URLSearchParams({ t: token, saved: '1' })}`);
}

/**
 * POST /unsubscribe. A mail program's one click (RFC 8058: `List-Unsubscribe=One-Click`, without cookies, from anywhere)
 * is done and answered with one line, never sent elsewhere; a person's button gives a page. The address holds the token,
 * and leaving twice is leaving once. Nobody's token is answered alike: whoever it was is not on the list.
 */
export async function postUnsubscribe({ request, url }: Pick<APIContext, 'request' | 'url'>): Promise<Response | null> {
  const field = await readForm(request);
  const token = url.searchParams.get('t') ?? '';
  if (!field) return plain(400, 'Send a form, with List-Unsubscribe=One-Click.');
  if (field('List-Unsubscribe').trim().toLowerCase() === 'one-click') {
    leave(token);
    return plain(200, 'You are off the list.');
  }
  if (field('do') === 'undo') undoLeaving(token);
  else if (field('do') === 'leave') leave(token);
  else return plain(400, 'Nothing was done: the form did not say what to do.');
  return null;
}

const plain = (status: number, sentence: string): Response =>
  new Response(`${sentence}\n`, {
    status,
    headers: { 'content-type': 'text/plain; charset=utf-8', 'cache-control': 'no-store' },
  });
