/** Remembers on this machine from which edition figures were taken, and says when a newer one is out. */
const place = document.querySelector<HTMLElement>('[data-cut-before]');
const slug = place?.dataset['cutBefore'];
const edition = Number(place?.dataset['edition']);
const TAKES = /\/(?:sheet|bench|sheet\.pdf|templates\.pdf|pieces(?:\.\w+|\/[^?]*))(?:[?#]|$)/u;

const attempt = <T>(work: () => T): T | undefined => {
  try {
    return work();
  } catch {
    // Storage is forbidden: then nothing is remembered.
    return undefined;
  }
};

if (place && slug) {
  const key = `foldwright.cut.${slug}`;
  const remember = () => attempt(() => localStorage.setItem(key, String(edition)));
  const had = Number(attempt(() => localStorage.getItem(key)));
  if (had > 0 && had < edition) {
    place.hidden = false;
    place.querySelector('[data-cut-edition]')?.replaceChildren(String(had));
    const link = place.querySelector<HTMLElement>('[data-had]');
    if (link) link.dataset['had'] = String(had);
  }
  window.addEventListener('beforeprint', remember);
  document.addEventListener('click', ({ target }) => {
    const link = target instanceof Element ? target.closest('a') : null;
    if (!link) return;
    if (link.pathname.startsWith(`/projects/${slug}/`) && TAKES.test(link.pathname)) remember();
    // The address follows the size; these links were written for the size that the page came with.
    if (link.dataset['had']) {
      const query = new URLSearchParams(location.search);
      query.set('had', link.dataset['had']);
      link.href = `${location.pathname}?${query}#changed`;
    }
  });
}
