/** Spares the reload when an admin changes somebody: the same forms, sent to the API, the row changed in place. */

interface Changed {
  readonly name: string;
  readonly role: string;
  readonly disabled: boolean;
}

export function changeInPlace(): void {
  document.getElementById('people')?.addEventListener('submit', (event) => {
    const form = event.target;
    const row = form instanceof HTMLFormElement ? form.closest<HTMLElement>('[data-person]') : null;
    if (!(form instanceof HTMLFormElement) || !row) return;
    event.preventDefault();
    void change(row, form, event.submitter instanceof HTMLButtonElement ? event.submitter : null);
  });
}

async function change(row: HTMLElement, form: HTMLFormElement, button: HTMLButtonElement | null): Promise<void> {
  const select = form.querySelector('select');
  const body = select ? { role: select.value } : { disabled: button?.value === 'disable' };
  if (button) button.disabled = true;
  try {
    const response = await fetch(`/api/admin/people/${row.dataset.person}`, {
      method: 'PATCH',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
    });
    const answer: unknown = await response.json();
    if (response.ok) show(row, answer as Changed);
    else
      refuse(row, (answer as { detail?: string }).detail ?? 'Nothing was changed. Load the page anew and try again.');
  } catch {
    refuse(row, 'The site did not answer, so nothing was changed. Try again when you are connected.');
  } finally {
    if (button) button.disabled = false;
    // The button that was pressed may be gone now; the other one stands at its place.
    if (button && button.offsetParent === null)
      [...form.querySelectorAll('button')].find((other) => other.offsetParent !== null)?.focus();
    else button?.focus();
  }
}

function show(row: HTMLElement, { name, role, disabled }: Changed): void {
  for (const option of row.querySelectorAll('option')) option.defaultSelected = option.selected = option.value === role;
  row.toggleAttribute('data-disabled', disabled);
  say('people-fault', '');
  say(
    'people-said',
    disabled
      ? `${name} is disabled and signed out everywhere.`
      : `${name} is ${role === 'reader' ? 'a' : 'an'} ${role}, and may sign in.`,
  );
}

function refuse(row: HTMLElement, sentence: string): void {
  for (const option of row.querySelectorAll('option')) option.selected = option.defaultSelected;
  say('people-fault', sentence);
}

function say(id: string, sentence: string): void {
  const place = document.getElementById(id);
  if (!place) return;
  place.textContent = sentence;
  if (id === 'people-fault') place.hidden = sentence === '';
}
