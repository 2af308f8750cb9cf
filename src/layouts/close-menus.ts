/** Menus open and close without a script; with one they also close on Escape and on a press elsewhere. */
const menus = () => document.querySelectorAll<HTMLDetailsElement>('details[name="site-menu"][open]');

document.addEventListener('keydown', (event) => {
  if (event.key !== 'Escape') return;
  for (const menu of menus()) {
    const inside = menu.contains(document.activeElement);
    menu.open = false;
    if (inside) menu.querySelector('summary')?.focus();
  }
});
document.addEventListener('pointerdown', (event) => {
  for (const menu of menus()) {
    if (event.target instanceof Node && !menu.contains(event.target)) menu.open = false;
  }
});
