import { morphInto } from '@/features/sizing/morph';
import { readKept, type MySheets } from './my-sheets';
import { editorHtml, type EditorState } from './my-sheets-html';
import { ADD_FIELDS, changeSheets } from './sheet-form';
import { keepSheets, keptSheets, sendSheets, tellSheets } from './sheet-keeper';

const DONE = { added: 'Added.', kept: 'Kept.', removed: 'Removed.' } as const;

/**
 * The list of one's sheets, changed in place. With an account (`data-account` holds its list) every change goes there;
 * without one it stays in this browser. What the browser kept before its reader signed in is offered to the account, once.
 */
class MySheetsElement extends HTMLElement {
  #sheets: MySheets = [];

  connectedCallback(): void {
    const account = this.dataset.account;
    this.#sheets = account === undefined ? keptSheets() : readKept(JSON.parse(account));
    if (account === undefined) this.#show({ sheets: this.#sheets });
    else this.#offer(keptSheets());
    this.addEventListener('submit', (event) => void this.#submitted(event));
    this.addEventListener('click', (event) => {
      const merge = (event.target as Element).closest<HTMLElement>('[data-merge]')?.dataset.merge;
      if (merge === 'add') void this.#merge();
      else if (merge === 'forget') this.#forget('Forgotten here. Your account has not changed.');
    });
    // Another tab may have changed what this browser keeps.
    window.addEventListener('storage', () => {
      if (account !== undefined) return;
      this.#sheets = keptSheets();
      this.#show({ sheets: this.#sheets });
      tellSheets(this.#sheets);
    });
  }

  async #submitted(event: SubmitEvent): Promise<void> {
    event.preventDefault();
    const form = event.target as HTMLFormElement;
    const data = new FormData(form, event.submitter);
    const field = (name: string) => {
      const value = data.get(name);
      return typeof value === 'string' ? value : '';
    };
    const outcome = changeSheets(this.#sheets, field);
    if (!outcome.ok) {
      const names = [...ADD_FIELDS, ...Object.keys(outcome.faults)].filter((name) => data.has(name));
      this.#show({
        sheets: this.#sheets,
        faults: outcome.faults,
        typed: Object.fromEntries(names.map((name) => [name, field(name)])),
      });
      this.querySelector<HTMLElement>('[aria-invalid=true]')?.focus();
      return;
    }
    const kept = await this.#keep(outcome.sheets);
    if (!kept) return;
    if (outcome.done !== 'kept') this.querySelector<HTMLFormElement>('.my-sheets-add')?.reset();
    this.#say(DONE[outcome.done]);
    // The button that was pressed may be gone with its row.
    if (outcome.done === 'removed') this.querySelector<HTMLElement>('#sheets-size')?.focus();
  }

  async #keep(sheets: MySheets): Promise<boolean> {
    try {
      if (this.dataset.account !== undefined) this.#sheets = await sendSheets(sheets, { how: 'replace' });
      else if (keepSheets(sheets)) this.#sheets = sheets;
      else throw new Error('This browser does not let the site keep anything. Sign in, and your account keeps them.');
    } catch (error) {
      this.#say(error instanceof Error ? error.message : 'It was not kept. Try again.');
      return false;
    }
    this.#show({ sheets: this.#sheets });
    tellSheets(this.#sheets);
    return true;
  }

  #offer(kept: MySheets): void {
    const place = this.querySelector<HTMLElement>('[data-offer]');
    if (place) place.hidden = kept.length === 0;
  }

  async #merge(): Promise<void> {
    try {
      this.#sheets = await sendSheets(keptSheets(), { how: 'merge' });
    } catch (error) {
      this.#say(error instanceof Error ? error.message : 'They were not added. Try again.');
      return;
    }
    this.#show({ sheets: this.#sheets });
    tellSheets(this.#sheets);
    this.#forget('Added to your account.');
  }

  #forget(sentence: string): void {
    keepSheets([]);
    this.#offer([]);
    this.#say(sentence);
  }

  #show(state: EditorState): void {
    const place = this.querySelector('[data-editor]');
    if (!place) return;
    const inputs = () => place.querySelectorAll<HTMLInputElement>('.my-sheets-list input');
    const before = new Map([...inputs()].map(({ id, value, defaultValue }) => [id, { value, defaultValue }]));
    morphInto(place, editorHtml(state));
    // Rows move up when one goes. A number that was typed and not kept yet stays with its size.
    for (const input of inputs()) {
      const was = before.get(input.id);
      input.value = was && was.defaultValue === input.defaultValue ? was.value : input.defaultValue;
    }
  }

  #say(sentence: string): void {
    const place = this.querySelector('[data-sheets-said]');
    if (place) place.textContent = sentence;
  }
}

if (!customElements.get('my-sheets')) customElements.define('my-sheets', MySheetsElement);
