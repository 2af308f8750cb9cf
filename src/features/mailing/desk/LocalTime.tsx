import { useEffect, useState } from 'react';

/** `10:52`, in the time of whoever looks; with the day when it is not today's. The server, which cannot know, says UTC. */
export function LocalTime({ at }: { readonly at: number }) {
  const [here, setHere] = useState(false);
  useEffect(() => setHere(true), []);
  return <time dateTime={new Date(at).toISOString()}>{timeWords(at, here)}</time>;
}

function timeWords(at: number, here: boolean): string {
  const zone = here ? {} : { timeZone: 'UTC' };
  const date = new Date(at);
  const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', ...zone });
  const time = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', ...zone }).format(date);
  const today = here ? day.format(date) === day.format(new Date()) : true;
  return `${today ? '' : `${day.format(date)}, `}${time}${here ? '' : ' UTC'}`;
}
