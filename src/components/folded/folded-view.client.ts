import type { Figures, Model } from '@/engine';
import { WANTS_FIGURES, type ShowsBox } from './show';
import type { FoldedSize, FoldedState } from './view';
import { foldWords, turnWords } from './words';

/** Degrees of tilt: from a little below to nearly straight down. */
const TILTS = { least: -45, most: 85 } as const;
/** Degrees for a pixel of dragging. */
const DRAG = { turn: 0.6, tilt: 0.4 } as const;
/** For a press of a key. */
const STEP = { degrees: 5, share: 0.05 } as const;
/** How long a box takes to turn to another side, milliseconds. */
const TURNING = 260;

type Draw = (typeof import('./view'))['viewSvg'];

/** Turns and folds the picture that came with the page. Until it has figures it keeps what was asked and draws it then. */
class FoldedViewElement extends HTMLElement implements ShowsBox {
  #state: FoldedState = { turn: 0, tilt: 0, share: 1, seeThrough: false, names: false };
  #box: { readonly model: Model; readonly figures: Figures } | null = null;
  #draw: Draw | null = null;
  #asked = false;
  #frame = 0;
  #turning = 0;
  #listening: AbortController | null = null;

  connectedCallback(): void {
    const { turn, tilt } = this.dataset;
    const form = this.#part('form');
    const stage = this.#part('[data-stage]');
    this.#state = { ...this.#state, turn: Number(turn), tilt: Number(tilt), ...this.#typed() };
    this.#listening = new AbortController();
    const { signal } = this.#listening;
    stage.tabIndex = 0;
    stage.addEventListener('pointerdown', (event) => this.#drag(event, stage), { signal });
    stage.addEventListener('keydown', (event) => this.#press(event), { signal });
    form.addEventListener('input', () => this.#go(this.#typed()), { signal });
    form.addEventListener('submit', (event) => this.#submit(event as SubmitEvent), { signal });
    for (const sign of ['pointerenter', 'focusin', 'pointerdown'])
      this.addEventListener(sign, () => void this.#wake(), { signal, once: true });
    this.dataset.ready = '';
  }

  disconnectedCallback(): void {
    this.#listening?.abort();
    cancelAnimationFrame(this.#frame);
    cancelAnimationFrame(this.#turning);
    this.#frame = 0;
  }

  /** Shows the box at these figures, as it is turned and folded now. The first ones are those of the page's own picture. */
  show(model: Model, figures: Figures): void {
    const first = this.#box === null;
    this.#box = { model, figures };
    if (!first || this.#asked) this.#ask();
  }

  async #wake(): Promise<void> {
    if (!this.#box) this.dispatchEvent(new CustomEvent(WANTS_FIGURES, { bubbles: true }));
    this.#draw ??= (await import('./view')).viewSvg;
    if (this.#asked) this.#ask();
  }

  #go(change: Partial<FoldedState>): void {
    this.#state = { ...this.#state, ...change };
    this.#ask();
  }

  /** However much changes in one frame, it is drawn once. */
  #ask(): void {
    this.#asked = true;
    if (!this.#draw) void this.#wake();
    if (!this.#draw || !this.#box || this.#frame !== 0) return;
    this.#frame = requestAnimationFrame(() => {
      this.#frame = 0;
      this.#asked = false;
      if (!this.#draw || !this.#box) return;
      const { model, figures } = this.#box;
      this.#part('[data-stage]').innerHTML = this.#draw(model, figures, this.#state, this.#size());
      this.#showControls();
    });
  }

  #drag(event: PointerEvent, stage: HTMLElement): void {
    if (event.button !== 0) return;
    cancelAnimationFrame(this.#turning);
    const from = { x: event.clientX, y: event.clientY, turn: this.#state.turn, tilt: this.#state.tilt };
    const held = new AbortController();
    const { signal } = held;
    stage.setPointerCapture(event.pointerId);
    stage.addEventListener(
      'pointermove',
      (move) => {
        if (move.pointerId !== event.pointerId) return;
        this.#go({
          turn: round(from.turn + (move.clientX - from.x) * DRAG.turn),
          tilt: tilted(from.tilt + (move.clientY - from.y) * DRAG.tilt),
        });
      },
      { signal },
    );
    for (const end of ['pointerup', 'pointercancel', 'lostpointercapture'])
      stage.addEventListener(end, () => held.abort(), { signal });
  }

  #press(event: KeyboardEvent): void {
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    const { turn, tilt, share } = this.#state;
    const change: Partial<FoldedState> | undefined = {
      ArrowLeft: { turn: round(turn - STEP.degrees) },
      ArrowRight: { turn: round(turn + STEP.degrees) },
      ArrowUp: { tilt: tilted(tilt - STEP.degrees) },
      ArrowDown: { tilt: tilted(tilt + STEP.degrees) },
      '+': { share: Math.min(1, share + STEP.share) },
      '=': { share: Math.min(1, share + STEP.share) },
      '-': { share: Math.max(0, share - STEP.share) },
    }[event.key];
    if (!change) return;
    event.preventDefault();
    cancelAnimationFrame(this.#turning);
    this.#go(change);
  }

  #submit(event: SubmitEvent): void {
    event.preventDefault();
    const { turn, tilt } = event.submitter?.dataset ?? {};
    if (turn === undefined || tilt === undefined) return;
    this.#turnTo(Number(turn), Number(tilt));
  }

  /** The short way round; at once for those who want nothing to move. */
  #turnTo(turn: number, tilt: number): void {
    cancelAnimationFrame(this.#turning);
    if (matchMedia('(prefers-reduced-motion: reduce)').matches) return this.#go({ turn, tilt });
    const start = { turn: this.#state.turn, tilt: this.#state.tilt, time: performance.now() };
    const way = round(turn - start.turn);
    const step = (now: number) => {
      const share = Math.min(1, Math.max(0, now - start.time) / TURNING);
      const eased = share * share * (3 - 2 * share);
      this.#go(
        share < 1
          ? { turn: round(start.turn + way * eased), tilt: start.tilt + (tilt - start.tilt) * eased }
          : { turn, tilt },
      );
      if (share < 1) this.#turning = requestAnimationFrame(step);
    };
    this.#turning = requestAnimationFrame(step);
  }

  /** The picture's size as it stands on the page, so that names are as large as other words. */
  #size(): FoldedSize {
    const [width, height] = [Number(this.dataset.width), Number(this.dataset.height)];
    const seen = this.#part('[data-stage] svg').getBoundingClientRect();
    const scale = Math.min(seen.width / width, seen.height / height) || 1;
    return { width: width * scale, height: height * scale };
  }

  #part(selector: string): HTMLElement {
    return this.querySelector<HTMLElement>(selector) as HTMLElement;
  }
  #field(name: string): HTMLInputElement {
    return this.querySelector<HTMLInputElement>(`input[name="view-${name}"]`) as HTMLInputElement;
  }
  /** What the form's fields say; a slider that still stands on the picture's rounded turn says nothing new. */
  #typed(): Partial<FoldedState> {
    const turn = this.#field('turn').valueAsNumber;
    return {
      ...(turn === Math.round(this.#state.turn) ? {} : { turn }),
      share: this.#field('fold').valueAsNumber / 100,
      seeThrough: this.#field('through').checked,
      names: this.#field('names').checked,
    };
  }
  #showControls(): void {
    const { turn, share } = this.#state;
    const [turned, folded] = [this.#field('turn'), this.#field('fold')];
    turned.value = String(Math.round(turn));
    turned.setAttribute('aria-valuetext', turnWords(turn));
    folded.value = String(Math.round(share * 100));
    folded.setAttribute('aria-valuetext', foldWords(share));
  }
}

/** Degrees from -180 to 180. */
const round = (turn: number): number => ((((turn + 180) % 360) + 360) % 360) - 180;
const tilted = (tilt: number): number => Math.min(TILTS.most, Math.max(TILTS.least, tilt));

if (!customElements.get('folded-view')) customElements.define('folded-view', FoldedViewElement);
