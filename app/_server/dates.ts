import 'server-only';

/** Instants as a drawing names them, in the time of the machine that serves (TZ). */
const dayFormat = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short' });
const yearFormat = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' });
const timeFormat = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', second: '2-digit' });

/** "30 Nov"; with its year where that isn't the year of `now`. */
export function day(instant: string, now: Date = new Date()): string {
  const date = new Date(instant);
  return (date.getFullYear() === now.getFullYear() ? dayFormat : yearFormat).format(date);
}

/** "16:42:07" */
export const time = (instant: string): string => timeFormat.format(new Date(instant));

/** "30 Nov, 16:42" */
export const dayTime = (instant: string): string => `${day(instant)}, ${time(instant).slice(0, 5)}`;
