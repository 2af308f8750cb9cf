import type { APIContext } from 'astro';
import { z } from 'zod';
import { ROLES } from '@/db/schema';
import { readForm } from '@/features/http/form';
import { formFaults, seeOther, type FormFaults } from './form-outcome';
import { invite, withdrawInvitation } from './invitations.server';
import { findById, personName, refused, setDisabled, setRole, type Person, type PersonOutcome } from './people.server';

/** What admins do with people: by form on /admin, and by /api/admin. */
export const personChangeSchema = z
  .object({ role: z.enum(ROLES).optional(), disabled: z.boolean().optional() })
  .strict()
  .refine(
    ({ role, disabled }) => (role === undefined) !== (disabled === undefined),
    'Give a role, or whether the person is disabled: one of the two.',
  );
export const invitationSchema = z.object({ email: z.string().max(320) }).strict();

/** A person as admins see them. */
export interface PersonRow {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly role: Person['role'];
  readonly disabled: boolean;
  readonly hasPassword: boolean;
  /** ISO 8601 */
  readonly since: string;
}

export const asRow = (person: Person): PersonRow => ({
  id: person.id,
  name: personName(person),
  email: person.email,
  role: person.role,
  disabled: person.disabledAt !== null,
  hasPassword: person.passwordHash !== null,
  since: person.createdAt.toISOString(),
});

export function changePerson(id: string, { role, disabled }: z.infer<typeof personChangeSchema>): PersonOutcome {
  if (!findById(id)) return refused('nobody', 'There is no such person any more. Load the list anew.');
  return role === undefined ? setDisabled(id, disabled ?? false) : setRole(id, role);
}

/** POST /admin: the forms of the page without JavaScript, told apart by their button. */
export async function postPeople(
  context: Pick<APIContext, 'request' | 'url' | 'locals'>,
): Promise<Response | FormFaults> {
  const field = await readForm(context.request);
  if (!field) return formFaults(400, { '': 'What was sent does not read. Load the page anew and try again.' });
  const back = seeOther(`/admin${context.url.search}`);
  const email = field('email');
  switch (field('do')) {
    case 'invite': {
      const outcome = invite(email, context.locals.user?.name ?? 'An admin');
      return outcome.ok ? back : formFaults(422, { email: outcome.sentence }, { email });
    }
    case 'withdraw':
      withdrawInvitation(email);
      return back;
    case 'role':
    case 'disable':
    case 'enable': {
      const change = personChangeSchema.safeParse(
        field('do') === 'role' ? { role: field('role') } : { disabled: field('do') === 'disable' },
      );
      if (!change.success) return formFaults(422, { '': 'There is no such role.' });
      const outcome = changePerson(field('id'), change.data);
      return outcome.ok ? back : formFaults(409, { '': outcome.sentence });
    }
    default:
      return formFaults(400, { '': `There is nothing here called “${field('do').slice(0, 40)}”.` });
  }
}
