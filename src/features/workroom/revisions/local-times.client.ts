/** Puts every `<time data-local>` into the time of whoever looks; the server, which cannot know it, says UTC. */
const date = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric' });
const time = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });
for (const element of document.querySelectorAll<HTMLTimeElement>('time[data-local]')) {
  const at = new Date(element.dateTime);
  const today = date.format(at) === date.format(new Date());
  element.textContent = today ? `today, ${time.format(at)}` : `${date.format(at)}, ${time.format(at)}`;
}
