import { WANTS_FIGURES } from '@/components/folded/show';

/**
 * Makes an example's form answer at once. Without this script the same form is sent to the server, which answers with
 * the whole page. The engine is fetched when somebody first reaches for the form.
 */
type Follow = (typeof import('./follow-example'))['followExample'];

for (const form of document.querySelectorAll<HTMLFormElement>('form[data-example]')) {
  let follow: Promise<ReturnType<Follow>> | null = null;
  const start = () => (follow ??= import('./follow-example').then(({ followExample }) => followExample(form)));

  // A page with a form shows this one box.
  document.addEventListener(WANTS_FIGURES, () => void start(), { once: true });
  form.addEventListener('pointerenter', () => void start(), { once: true });
  form.addEventListener('focusin', () => void start(), { once: true });
  form.addEventListener('input', (event) => void start().then((answer) => answer(event.target)));
  form.addEventListener('submit', (event) => {
    event.preventDefault();
    void start().then((answer) => answer(null));
  });
}
