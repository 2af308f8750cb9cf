import type { SumId } from './sums';

/** Makes the sums of a guide follow what is typed. What works them out is fetched when somebody first reaches for one. */
const load = () =>
  Promise.all([import('./sum-html'), import('./sums'), import('@/features/sizing/morph')] as const).then(
    ([{ sumAnswerHtml }, { sumField }, { morphInto }]) => ({ sumAnswerHtml, sumField, morphInto }),
  );

for (const form of document.querySelectorAll<HTMLFormElement>('form[data-sum]')) {
  let loaded: ReturnType<typeof load> | null = null;
  const start = () => (loaded ??= load());
  const answer = () =>
    void start().then(({ sumAnswerHtml, sumField, morphInto }) => {
      const id = form.dataset.sum as SumId;
      const fields = new FormData(form);
      const place = form.querySelector('[data-sum-answer]');
      const field = (name: string) => String(fields.get(sumField(id, name)) ?? '');
      if (place) morphInto(place, sumAnswerHtml(id, field));
    });
  form.addEventListener('pointerenter', () => void start(), { once: true });
  form.addEventListener('focusin', () => void start(), { once: true });
  form.addEventListener('input', answer);
  form.addEventListener('submit', (event) => {
    event.preventDefault();
    answer();
  });
}
