import type { APIContext } from 'astro';
import { z } from 'zod';
import { config } from '@/config.server';
import { readForm } from '@/features/http/form';
import { takeTurn } from '@/features/limits/limits.server';
import { passwordChangedLetter } from './account-letters';
import { deleteAccount } from './account-data.server';
import { formFaults, seeOther, type FormFaults } from './form-outcome';
import { judgePassword, PASSWORD_MOST } from './password-rule';
import { passwordFits } from './passwords.server';
import {
  emailKey,
  findById,
  personName,
  refused,
  setName,
  setPassword,
  type Person,
  type PersonOutcome,
  type Refused,
} from './people.server';
import { post } from './post.server';
import { nameFault } from './sign-in-forms.server';
import { beginSession, endSession, type SignIn } from './session.server';

/** What somebody may do with their own account: by form on /account, and by /api/account. */
type Context = Pick<APIContext, 'request' | 'cookies' | 'locals' | 'clientAddress'>;

/** Having used a link this recently stands in for the old password: that is how a forgotten one is replaced. */
const LINK_COUNTS_MINUTES = 30;

export const needsOldPassword = (person: Person, signIn: SignIn | null): boolean =>
  person.passwordHash !== null && !(signIn?.by === 'link' && Date.now() - signIn.at < LINK_COUNTS_MINUTES * 60_000);

export const nameSchema = z.object({ name: z.string() }).strict();
export const passwordSchema = z
  .object({ current: z.string().max(PASSWORD_MOST).optional(), next: z.string() })
  .strict();
export const deletionSchema = z.object({ email: z.string(), keepName: z.boolean() }).strict();

/** The person behind the request; the middleware has seen that there is one. */
export function ownPerson({ locals }: Pick<APIContext, 'locals'>): Person {
  const person = locals.user && findById(locals.user.id);
  if (!person) throw new Error('An account page was reached without an account.');
  return person;
}

export function changeName(person: Person, name: string): PersonOutcome {
  const fault = nameFault(name.trim()).name;
  return fault ? refused('name', fault) : setName(person.id, name);
}

/** Changes the password, ends every other session, keeps this one, and tells the owner by mail. */
export async function changePassword(
  context: Context,
  person: Person,
  { current = '', next }: z.infer<typeof passwordSchema>,
): Promise<PersonOutcome | TooOften> {
  const verdict = judgePassword(next, { name: person.name ?? '', email: person.email });
  if (!verdict.ok) return refused('next', verdict.sentence);
  if (needsOldPassword(person, context.locals.signIn)) {
    const turn = await takeTurn('sign-in', { ip: context.clientAddress, emailKey: person.emailKey });
    if (!turn.ok) return { ...turn, code: 'too-often' };
    if (!(await passwordFits(person.passwordHash, current)))
      return refused('current', 'That is not your password as it is now.');
    await turn.giveBack();
  }
  const changed = await setPassword(person.id, next);
  if (changed.ok) {
    await beginSession(context, changed.person, 'password');
    post(person, passwordChangedLetter({ signIn: `${config.siteUrl}/sign-in` }));
  }
  return changed;
}
type TooOften = { readonly ok: false; readonly code: 'too-often'; readonly sentence: string; readonly seconds: number };

export async function removeAccount(
  context: Context,
  person: Person,
  { email, keepName }: z.infer<typeof deletionSchema>,
): Promise<{ ok: true } | Refused> {
  if (emailKey(email) !== person.emailKey) return refused('email', `Type ${person.email} to show that you mean it.`);
  const deleted = await deleteAccount(person, { keepName });
  if (deleted.ok) endSession(context);
  return deleted;
}

/** POST /account: the page's three forms, told apart by their button. */
export async function postAccount(context: Context): Promise<Response | FormFaults> {
  const field = await readForm(context.request);
  if (!field) return formFaults(400, { '': 'What was sent does not read. Load the page anew and try again.' });
  const person = ownPerson(context);
  switch (field('do')) {
    case 'name': {
      const outcome = changeName(person, field('name'));
      return outcome.ok
        ? seeOther('/account?done=name')
        : formFaults(422, { name: outcome.sentence }, { name: field('name') });
    }
    case 'password': {
      const outcome = await changePassword(context, person, {
        current: field('current').slice(0, PASSWORD_MOST),
        next: field('next'),
      });
      return outcome.ok
        ? seeOther('/account?done=password')
        : formFaults(422, { [outcome.code === 'next' ? 'next' : 'current']: outcome.sentence });
    }
    case 'delete': {
      const outcome = await removeAccount(context, person, {
        email: field('email'),
        keepName: field('keep-name') === 'yes',
      });
      return outcome.ok
        ? seeOther('/sign-in?gone')
        : formFaults(422, { email: outcome.sentence }, { email: field('email') });
    }
    default:
      return formFaults(400, { '': `There is nothing here called “${field('do').slice(0, 40)}”.` });
  }
}

/** How the API shows a person to themselves. */
export const asOwnAccount = (person: Person) => ({
  id: person.id,
  name: personName(person),
  email: person.email,
  role: person.role,
});
