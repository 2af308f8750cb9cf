import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { db } from '@/db/client.server';
import { editions, letters, projects, users, verificationTokens } from '@/db/schema';
import type { FormFaults } from '@/features/accounts/form-outcome';
import {
  createPerson,
  findByEmail,
  findById,
  listPeople,
  setDisabled,
  setPassword,
  setRole,
  type Person,
} from '@/features/accounts/people.server';
import { postAccount } from '@/features/accounts/own-account.server';
import {
  postInvitation,
  postSignIn,
  postSignInLink,
  postSignUp,
  postSignUpConfirm,
} from '@/features/accounts/sign-in-forms.server';
import { readSignUp } from '@/features/accounts/sign-up.server';
import { onRequest } from '@/middleware';
import { emptyWriteUp } from '../setup/empty-write-up';
import { testDatabase } from '../setup/test-database';
import { call, cast, contextOf, cookiesOf, HERE, sessionCookie, withCookies, type Cast } from './harness';

const PASSWORD = 'damp snail tin lantern';
let people: Cast;
let wenna: Person;

beforeEach(async () => {
  testDatabase();
  people = await cast();
  wenna = await made({ email: 'Wenna@QuilletLane.example', name: 'Wenna Tolliver', password: PASSWORD });
});

async function made(person: Parameters<typeof createPerson>[0]): Promise<Person> {
  const outcome = await createPerson(person);
  if (!outcome.ok) throw new Error(outcome.sentence);
  return outcome.person;
}

/** Posts a form to a page's handler. */
async function post(
  handler: (context: ReturnType<typeof contextOf>) => Promise<Response | FormFaults>,
  fields: Record<string, string>,
  { cookie = '', path = '/sign-in' } = {},
) {
  const request = new Request(HERE + path, {
    method: 'POST',
    headers: { origin: HERE, cookie },
    body: new URLSearchParams(fields),
  });
  const context = contextOf(request, { path });
  await onRequest(context, () => Promise.resolve(new Response('')));
  const outcome = await handler(context);
  return outcome instanceof Response
    ? {
        status: outcome.status,
        to: outcome.headers.get('location'),
        cookie: cookiesOf(withCookies(outcome, context)),
        faults: {},
      }
    : { ...outcome, to: null, cookie: '' };
}
const signIn = (fields: Record<string, string>) =>
  post(postSignIn, { email: wenna.email, password: PASSWORD, ...fields });
const who = async (cookie: string) =>
  (await (await call('GET', '/api/account', { headers: { cookie } })).json()) as {
    email?: string;
    role?: string;
    code?: string;
  };
const lettersTo = (address: string) =>
  db.select().from(letters).where(eq(letters.toAddress, address)).orderBy(letters.createdAt).all();
function linkIn(text: string | undefined): URLSearchParams {
  const address = /^http:\/\/\S+$/m.exec(text ?? '')?.[0];
  if (!address) throw new Error('The letter holds no address on a line of its own.');
  return new URL(address).searchParams;
}
const asFields = (link: URLSearchParams) => Object.fromEntries(link);

describe('signing in with a password', () => {
  it('begins a session and goes on to the page that was wanted', async () => {
    const { status, to, cookie } = await signIn({ to: '/projects/seed-box?units=mm' });
    expect([status, to]).toEqual([303, '/projects/seed-box?units=mm']);
    expect(await who(cookie)).toMatchObject({ email: 'Wenna@QuilletLane.example', role: 'reader' });
  });

  it('takes the address in any way of writing it', async () => {
    expect((await signIn({ email: ' WENNA@quilletlane.EXAMPLE ' })).status).toBe(303);
  });

  it('takes readers to the projects and authors to the workroom, and nobody to another site', async () => {
    expect((await signIn({ to: 'https://elsewhere.example' })).to).toBe('/projects');
    setRole(wenna.id, 'author');
    expect((await signIn({ to: '//elsewhere.example' })).to).toBe('/workroom');
  });

  it('says the same for a wrong password, an unknown address, a disabled person and one without a password', async () => {
    const same = { status: 401, faults: { '': 'That address and password do not belong together.' } };
    expect(await signIn({ password: 'not the password' })).toMatchObject(same);
    expect(await signIn({ email: 'nobody@quilletlane.example' })).toMatchObject(same);
    expect(await signIn({ email: people.reader.email })).toMatchObject(same);
    setDisabled(wenna.id, true);
    expect(await signIn({})).toMatchObject(same);
  });

  it('never shows the typed password again', async () => {
    expect(JSON.stringify(await signIn({ password: 'not the password' }))).not.toContain('not the password');
  });

  it('takes as long for an unknown address as for a known one', async () => {
    const time = async (email: string) => {
      const begun = performance.now();
      await signIn({ email, password: 'not the password' });
      return performance.now() - begun;
    };
    await time('warm@quilletlane.example');
    const known = await time(wenna.email);
    const unknown = await time('nobody@quilletlane.example');
    // Without a hash to compare with, it would be a hundred times faster.
    expect(unknown).toBeGreaterThan(known / 5);
  });

  it('is refused after eight wrong passwords even with the right one, and says that a link still works', async () => {
    for (let i = 0; i < 8; i += 1) await signIn({ password: `wrong ${i}` });
    expect(await signIn({})).toMatchObject({
      status: 429,
      faults: { '': 'That was tried too often. Wait 15 minutes, then try again. A sign-in link still works.' },
    });
    expect((await signIn({ with: 'link' })).to).toBe('/sign-in/sent');
  });

  it('is not used up by right passwords', async () => {
    for (let i = 0; i < 12; i += 1) expect((await signIn({})).status).toBe(303);
  });
});

describe('a session', () => {
  it('ends at once when the person is disabled, and does not come back when they are enabled', async () => {
    const cookie = await sessionCookie(wenna);
    expect((await who(cookie)).email).toBe(wenna.email);
    setDisabled(wenna.id, true);
    expect((await who(cookie)).code).toBe('sign-in-first');
    setDisabled(wenna.id, false);
    expect((await who(cookie)).code).toBe('sign-in-first');
  });

  it('has the new role on the next request', async () => {
    const cookie = await sessionCookie(wenna);
    expect((await call('GET', '/api/admin/people', { headers: { cookie } })).status).toBe(403);
    setRole(wenna.id, 'admin');
    expect((await call('GET', '/api/admin/people', { headers: { cookie } })).status).toBe(200);
    setRole(wenna.id, 'reader');
    expect((await call('GET', '/api/admin/people', { headers: { cookie } })).status).toBe(403);
  });

  it('that was forged or damaged is cleared', async () => {
    const [name] = (await sessionCookie(wenna)).split('=');
    const answer = await call('GET', '/api/account', { headers: { cookie: `${name}=eyJhbGciOiJub25lIn0.e30.` } });
    expect(answer.status).toBe(401);
    expect(answer.headers.getSetCookie()).toContain(`${name}=; Path=/`);
  });

  it('leaves nothing in a cache', async () => {
    expect((await call('GET', '/api/health', { as: wenna })).headers.get('cache-control')).toMatch(/no-store/);
  });
});

describe('a sign-in link', () => {
  const ask = (email: string, to = '/') => post(postSignIn, { email, with: 'link', to });

  it('signs in when its button is pressed, once', async () => {
    expect(await ask(wenna.email, '/account')).toMatchObject({ status: 303, to: '/sign-in/sent' });
    const [letter] = lettersTo(wenna.email);
    expect(letter).toMatchObject({ subject: 'Your sign-in link for Foldwright', toName: 'Wenna Tolliver' });
    const link = linkIn(letter?.text);
    expect(letter?.text).toContain(`${HERE}/sign-in/confirm?`);
    expect(link.get('to')).toBe('/account');

    const used = await post(postSignInLink, asFields(link));
    expect([used.status, used.to]).toEqual([303, '/account']);
    expect((await who(used.cookie)).email).toBe(wenna.email);
    expect(await post(postSignInLink, asFields(link))).toMatchObject({
      status: 400,
      faults: { '': 'This link no longer works: it is older than a quarter of an hour, or it was used already.' },
    });
  });

  it('is stored as a hash alone', async () => {
    await ask(wenna.email);
    const token = linkIn(lettersTo(wenna.email)[0]?.text).get('token');
    expect(JSON.stringify(db.select().from(verificationTokens).all())).not.toContain(token);
  });

  it('works for the address that it was sent to and no other', async () => {
    await ask(wenna.email);
    const link = linkIn(lettersTo(wenna.email)[0]?.text);
    expect((await post(postSignInLink, { ...asFields(link), email: people.admin.email })).status).toBe(400);
    expect((await post(postSignInLink, asFields(link))).status).toBe(303);
  });

  it('no longer works after a quarter of an hour', async () => {
    await ask(wenna.email);
    db.update(verificationTokens)
      .set({ expires: new Date(Date.now() - 1) })
      .run();
    expect((await post(postSignInLink, asFields(linkIn(lettersTo(wenna.email)[0]?.text)))).status).toBe(400);
  });

  it('is said to be sent to everyone alike; an unknown address becomes a reader when it is used, not before', async () => {
    expect(await ask('new@quilletlane.example')).toMatchObject({ status: 303, to: '/sign-in/sent', faults: {} });
    expect(findByEmail('new@quilletlane.example')).toBeUndefined();
    const used = await post(postSignInLink, asFields(linkIn(lettersTo('new@quilletlane.example')[0]?.text)));
    expect(used.to).toBe('/projects');
    expect(await who(used.cookie)).toMatchObject({ email: 'new@quilletlane.example', role: 'reader' });
  });

  it('is said to be sent to a disabled person, and is not', async () => {
    setDisabled(wenna.id, true);
    expect(await ask(wenna.email)).toMatchObject({ status: 303, to: '/sign-in/sent' });
    expect(lettersTo(wenna.email)).toEqual([]);
  });

  it('that was sent before somebody was disabled does not let them in', async () => {
    await ask(wenna.email);
    setDisabled(wenna.id, true);
    const used = await post(postSignInLink, asFields(linkIn(lettersTo(wenna.email)[0]?.text)));
    expect(used).toMatchObject({ status: 400, cookie: '' });
  });

  it('is sent four times in a quarter of an hour at most', async () => {
    for (let i = 0; i < 4; i += 1) await ask(wenna.email);
    expect((await ask(wenna.email)).status).toBe(429);
    expect(lettersTo(wenna.email)).toHaveLength(4);
  });

  it('is not sent to what is no address', async () => {
    expect(await ask('wenna@quilletlane.example\nBcc: all@quilletlane.example')).toMatchObject({
      status: 422,
      faults: { email: 'That is not an e-mail address: it looks like name@place.example.' },
    });
  });
});

describe('signing up', () => {
  const fields = { name: 'Odo Marl', email: 'odo@quilletlane.example', password: 'seven wet gloves' };
  const signUp = (changed: Partial<typeof fields> = {}) =>
    post(postSignUp, { ...fields, ...changed }, { path: '/sign-up' });
  const confirm = (token: string, { cookie = '', password = '' } = {}) =>
    post(postSignUpConfirm, { token, password }, { cookie, path: '/sign-up/confirm' });
  const tokenFor = (email: string) => linkIn(lettersTo(email).at(-1)?.text).get('token') ?? '';

  it('makes a reader when the button behind the letter is pressed in the same browser, not before', async () => {
    const asked = await signUp();
    expect([asked.status, asked.to]).toEqual([303, '/sign-up/sent']);
    expect(findByEmail(fields.email)).toBeUndefined();
    const confirmed = await confirm(tokenFor(fields.email), { cookie: asked.cookie });
    expect(confirmed.to).toBe('/account?welcome');
    expect(await who(confirmed.cookie)).toMatchObject({ email: fields.email, role: 'reader' });
    expect((await post(postSignIn, { email: fields.email, password: fields.password })).status).toBe(303);
  });

  it('asks for the chosen password in another browser: whoever owns the address does not take over a stranger’s password', async () => {
    await signUp();
    const token = tokenFor(fields.email);
    const elsewhere = contextOf(new Request(`${HERE}/sign-up/confirm`));
    expect(await readSignUp(elsewhere, token)).toEqual({ email: fields.email, name: 'Odo Marl', needsPassword: true });
    expect(await confirm(token, { password: 'a guess of mine' })).toMatchObject({
      status: 401,
      faults: { password: 'That is not the password that you chose when you signed up.' },
    });
    expect(findByEmail(fields.email)).toBeUndefined();
    expect((await confirm(token, { password: fields.password })).status).toBe(303);
  });

  it('answers alike for a known address, whose owner is told by mail and whose account is not touched', async () => {
    expect(await signUp({ email: wenna.email })).toMatchObject({ status: 303, to: '/sign-up/sent', faults: {} });
    expect(lettersTo(wenna.email).map(({ subject }) => subject)).toEqual(['You already have a Foldwright account']);
    expect(findById(wenna.id)).toEqual(wenna);
  });

  it('works once: a second press leads to signing in', async () => {
    const { cookie } = await signUp();
    const token = tokenFor(fields.email);
    await confirm(token, { cookie });
    expect(await confirm(token, { cookie })).toMatchObject({ status: 303, to: '/sign-in', cookie: '' });
  });

  it('names everything that does not fit at once', async () => {
    expect(await signUp({ name: ' ', email: 'odo', password: 'short' })).toMatchObject({
      status: 422,
      faults: {
        name: 'Say what to call you. It stands under what you publish or ask.',
        email: 'That is not an e-mail address: it looks like name@place.example.',
        password: 'Too short: 5 more characters to go.',
      },
    });
  });

  it('refuses a link that was changed', async () => {
    await signUp();
    const token = tokenFor(fields.email);
    expect((await confirm(`${token.slice(0, -4)}AAAA`, { password: fields.password })).status).toBe(400);
    expect((await confirm('', { password: fields.password })).status).toBe(400);
  });
});

describe('an invitation', () => {
  const inviteTo = (email: string) => call('POST', '/api/admin/invitations', { as: people.admin, body: { email } });
  const linkTo = (email: string) => asFields(linkIn(lettersTo(email).at(-1)?.text));

  it('makes an author with a name and a password of their own', async () => {
    expect((await inviteTo('ines@quilletlane.example')).status).toBe(201);
    expect(findByEmail('ines@quilletlane.example')).toBeUndefined();
    const accepted = await post(postInvitation, {
      ...linkTo('ines@quilletlane.example'),
      name: 'Ines Thornbury',
      password: 'paper lantern seeds',
    });
    expect([accepted.status, accepted.to]).toEqual([303, '/workroom']);
    expect(await who(accepted.cookie)).toMatchObject({
      email: 'ines@quilletlane.example',
      role: 'author',
      name: 'Ines Thornbury',
    });
  });

  it('makes a reader an author when they accept, and leaves their password', async () => {
    await inviteTo(wenna.email);
    expect(findById(wenna.id)?.role).toBe('reader');
    await post(postInvitation, linkTo(wenna.email));
    expect(findById(wenna.id)).toMatchObject({ role: 'author', passwordHash: wenna.passwordHash });
  });

  it('works once, and not after it was withdrawn or sent anew', async () => {
    await inviteTo(wenna.email);
    const first = linkTo(wenna.email);
    db.delete(letters).run();
    await inviteTo(wenna.email);
    const second = linkTo(wenna.email);
    expect((await post(postInvitation, first)).status).toBe(400);
    expect(
      (await call('DELETE', '/api/admin/invitations', { as: people.admin, body: { email: wenna.email } })).status,
    ).toBe(204);
    expect(await post(postInvitation, second)).toMatchObject({
      status: 400,
      faults: { '': 'This invitation no longer works. Ask for a new one.' },
    });
    expect(findById(wenna.id)?.role).toBe('reader');
  });

  it('is no sign-in link, and a sign-in link is no invitation', async () => {
    await inviteTo(wenna.email);
    const invitation = linkTo(wenna.email);
    expect((await post(postSignInLink, invitation)).status).toBe(400);
    expect((await post(postSignInLink, { ...invitation, email: `invite:${wenna.emailKey}` })).status).toBe(400);
    db.delete(letters).run();
    await post(postSignIn, { email: wenna.email, with: 'link' });
    expect((await post(postInvitation, linkTo(wenna.email))).status).toBe(400);
  });

  it('does not go to somebody who is an author already or is disabled', async () => {
    expect(await (await inviteTo(people.author.email)).json()).toMatchObject({
      status: 409,
      detail: 'author@quilletlane.example is an author already.',
    });
    setDisabled(wenna.id, true);
    expect(await (await inviteTo(wenna.email)).json()).toMatchObject({
      detail: 'wenna@quilletlane.example is disabled. Enable the account first.',
    });
  });
});

describe('looking after people', () => {
  it('never leaves the site without an admin', async () => {
    const sentence = 'A test admin is the only admin. Make somebody else an admin first.';
    expect(setRole(people.admin.id, 'reader')).toEqual({ ok: false, code: 'last-admin', sentence });
    const answer = await call('PATCH', `/api/admin/people/${people.admin.id}`, {
      as: people.admin,
      body: { disabled: true },
    });
    expect(await answer.json()).toMatchObject({ status: 409, code: 'last-admin' });
    expect(
      (await call('DELETE', '/api/account', { as: people.admin, body: { email: people.admin.email, keepName: true } }))
        .status,
    ).toBe(409);
    setRole(wenna.id, 'admin');
    expect(setRole(people.admin.id, 'reader').ok).toBe(true);
    expect(setDisabled(wenna.id, true).ok).toBe(false);
  });

  it('does not count a disabled admin as one', () => {
    setRole(wenna.id, 'admin');
    setDisabled(wenna.id, true);
    expect(setRole(people.admin.id, 'author').ok).toBe(false);
  });

  it('finds people by every word of name or address, whatever its case', async () => {
    expect(listPeople('toll QUILLET').people.map(({ id }) => id)).toEqual([wenna.id]);
    expect(listPeople('%').people).toEqual([]);
    const answer = await call('GET', '/api/admin/people?search=wenna', { as: people.admin });
    const { people: rows, total } = (await answer.json()) as { people: object[]; total: number };
    expect(total).toBe(1);
    expect(Object.keys(rows[0] ?? {}).sort()).toEqual([
      'disabled',
      'email',
      'hasPassword',
      'id',
      'name',
      'role',
      'since',
    ]);
  });

  it('refuses an address that somebody has, however it is written', async () => {
    expect(await createPerson({ email: 'WENNA@quilletlane.example' })).toEqual({
      ok: false,
      code: 'taken',
      sentence: 'Somebody has an account with wenna@quilletlane.example.',
    });
  });

  it('takes one change at a time', async () => {
    const change = (body: object) => call('PATCH', `/api/admin/people/${wenna.id}`, { as: people.admin, body });
    expect((await change({})).status).toBe(422);
    expect((await change({ role: 'author', disabled: true })).status).toBe(422);
    expect((await change({ role: 'owner' })).status).toBe(422);
    expect(
      (await call('PATCH', '/api/admin/people/nobody', { as: people.admin, body: { role: 'author' } })).status,
    ).toBe(404);
  });
});

describe('one’s own account', () => {
  const account = (person: Person, fields: Record<string, string>, cookie: string) =>
    post(postAccount, { email: person.email, ...fields }, { cookie, path: '/account' });

  it('changes the password, keeps this session and ends every other', async () => {
    const other = await sessionCookie(wenna);
    const here = await sessionCookie(wenna);
    const changed = await account(wenna, { do: 'password', current: PASSWORD, next: 'eight wet gloves' }, here);
    expect(changed.to).toBe('/account?done=password');
    expect((await who(changed.cookie)).email).toBe(wenna.email);
    expect((await who(other)).code).toBe('sign-in-first');
    expect((await signIn({ password: PASSWORD })).status).toBe(401);
    expect((await signIn({ password: 'eight wet gloves' })).status).toBe(303);
    expect(lettersTo(wenna.email).map(({ subject }) => subject)).toEqual(['Your Foldwright password was changed']);
  });

  it('asks for the old password, except of someone who has just used a link', async () => {
    const wrong = await account(
      wenna,
      { do: 'password', current: 'a guess of mine', next: 'eight wet gloves' },
      await sessionCookie(wenna),
    );
    expect(wrong).toMatchObject({ status: 422, faults: { current: 'That is not your password as it is now.' } });
    const byLink = await account(
      wenna,
      { do: 'password', next: 'eight wet gloves' },
      await sessionCookie(wenna, 'link'),
    );
    expect(byLink.status).toBe(303);
  });

  it('lets nobody guess the old password without end', async () => {
    const cookie = await sessionCookie(wenna);
    const guess = (current: string) =>
      call('PUT', '/api/account/password', { headers: { cookie }, body: { current, next: 'eight wet gloves' } });
    for (let i = 0; i < 8; i += 1) expect((await guess(`wrong ${i}`)).status).toBe(422);
    expect((await guess(PASSWORD)).status).toBe(429);
  });

  it('changes the name, and says what is wrong with one', async () => {
    const change = (name: string) => call('PATCH', '/api/account', { as: wenna, body: { name } });
    expect(await (await change('  Wenna T.  ')).json()).toMatchObject({ name: 'Wenna T.' });
    expect(await (await change('Wen\u202ena')).json()).toMatchObject({
      status: 422,
      detail: 'The name holds characters that cannot be seen. Type it anew.',
    });
    expect((await change('x'.repeat(81))).status).toBe(422);
  });

  it('is exported without hashes and without other people', async () => {
    const answer = await call('GET', '/api/account/export', { as: wenna });
    expect(answer.headers.get('content-disposition')).toBe('attachment; filename="foldwright-own-data.json"');
    const text = await answer.text();
    expect(JSON.parse(text)).toMatchObject({
      account: { name: 'Wenna Tolliver', email: 'Wenna@QuilletLane.example', role: 'reader', hasPassword: true },
      projects: [],
    });
    expect(text).not.toContain('argon2');
    expect(text).not.toContain(people.admin.email);
  });

  const remove = (person: Person, body: object) => call('DELETE', '/api/account', { as: person, body });

  it('of a reader is deleted without a trace, after the address was typed', async () => {
    expect(await (await remove(wenna, { email: 'ines@quilletlane.example', keepName: true })).json()).toMatchObject({
      detail: 'Type Wenna@QuilletLane.example to show that you mean it.',
    });
    expect((await remove(wenna, { email: 'wenna@quilletlane.example', keepName: true })).status).toBe(204);
    expect(findById(wenna.id)).toBeUndefined();
  });

  function projectOf(author: Person, id: string, published: boolean): void {
    const nothing = {} as never;
    const state = { title: id, pattern: nothing, sizing: nothing, writeUp: emptyWriteUp() };
    db.insert(projects)
      .values({ id, authorId: author.id, slug: id, ...state })
      .run();
    if (published)
      db.insert(editions)
        .values({ id: `${id}-1`, projectId: id, n: 1, summary: '', publishedBy: author.id, ...state })
        .run();
  }

  it.each([
    [true, 'A test author'],
    [false, 'A former author'],
  ])('of an author is emptied, drafts go, editions stay (name kept: %s)', async (keepName, name) => {
    projectOf(people.author, 'published', true);
    projectOf(people.author, 'draft', false);
    const cookie = await sessionCookie(people.author);
    expect((await remove(people.author, { email: people.author.email, keepName })).status).toBe(204);
    expect(db.select({ id: projects.id }).from(projects).all()).toEqual([{ id: 'published' }]);
    expect(db.select({ id: editions.id }).from(editions).all()).toEqual([{ id: 'published-1' }]);
    const left = db.select().from(users).where(eq(users.id, people.author.id)).get();
    expect(left).toMatchObject({ name, email: `${people.author.id}@gone.invalid`, passwordHash: null, role: 'reader' });
    expect((await who(cookie)).code).toBe('sign-in-first');
    expect(listPeople().people.map(({ id }) => id)).not.toContain(people.author.id);
    // The address is free again.
    expect((await createPerson({ email: people.author.email })).ok).toBe(true);
  });

  it('sets a password that ends every session when an admin’s tool does it', async () => {
    const cookie = await sessionCookie(wenna);
    await setPassword(wenna.id, 'nine wet gloves');
    expect((await who(cookie)).code).toBe('sign-in-first');
  });
});

describe('pages', () => {
  const page = async (
    path: string,
    { as, ip = '127.0.0.1', route = path }: { as?: Person; ip?: string; route?: string } = {},
  ) => {
    const cookie = as ? await sessionCookie(as) : '';
    const context = contextOf(new Request(HERE + path, { headers: { cookie } }), { ip, path: route });
    return (await onRequest(context, () => Promise.resolve(new Response('page')))) as Response;
  };

  it('that need an account lead to signing in and back', async () => {
    const answer = await page('/workroom/draft?x=1');
    expect([answer.status, answer.headers.get('location')]).toEqual([303, '/sign-in?to=%2Fworkroom%2Fdraft%3Fx%3D1']);
  });

  it('for another role say so', async () => {
    expect(await (await page('/admin', { as: people.author })).text()).toBe('page /sign-in/refused');
    expect(await (await page('/admin', { as: people.admin })).text()).toBe('page');
  });

  it('that are in no table are not there, even for admins', async () => {
    const answer = await page('/secret', { as: people.admin });
    expect([answer.status, answer.body]).toEqual([404, null]);
  });

  it('of the local mailbox are for this machine alone', async () => {
    expect((await page('/dev/mailbox')).status).toBe(200);
    expect((await page('/dev/mailbox', { ip: '192.0.2.7' })).status).toBe(404);
    expect((await page('/dev/mailbox', { ip: '192.0.2.7', as: people.admin })).status).toBe(404);
  });

  it('of errors are shown at the address that failed', async () => {
    expect((await page('/secret', { route: '/404' })).status).toBe(200);
  });

  it('refuse a form from another site in plain words', async () => {
    const request = new Request(`${HERE}/sign-out`, {
      method: 'POST',
      headers: { origin: 'https://elsewhere.example' },
    });
    const answer = (await onRequest(contextOf(request), () => Promise.resolve(new Response('page')))) as Response;
    expect(answer.status).toBe(403);
    expect(await answer.text()).toBe(
      'This was not sent from a page of this site, so it was not done. Open the page here and try again.\n',
    );
  });
});
