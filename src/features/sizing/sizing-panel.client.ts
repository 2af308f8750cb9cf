import { WANTS_FIGURES } from '@/components/folded/show';

/**
 * The reader's one island. The page is whole without it: it waits until the browser is idle, or until the panel is
 * touched, and then fetches what makes every figure follow at once.
 */
class SizingPanelElement extends HTMLElement {
  #started = false;

  connectedCallback(): void {
    const start = () => void this.#start();
    for (const sign of ['pointerdown', 'focusin', 'pointerenter']) this.addEventListener(sign, start, { once: true });
    document.addEventListener(WANTS_FIGURES, start, { once: true });
    if ('requestIdleCallback' in window) requestIdleCallback(start, { timeout: 2000 });
    else setTimeout(start, 300);
  }

  async #start(): Promise<void> {
    if (this.#started) return;
    this.#started = true;
    const { startReader } = await import('./reader-page.client');
    startReader(this);
  }
}

if (!customElements.get('sizing-panel')) customElements.define('sizing-panel', SizingPanelElement);
