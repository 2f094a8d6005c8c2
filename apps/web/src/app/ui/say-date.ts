/** Calendar dates (`YYYY-MM-DD`) and instants as people say them. A calendar date never moves with the time zone. */

const names = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', timeZone: 'UTC' });
const withYear = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  timeZone: 'UTC',
});
const moment = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'long',
  hour: '2-digit',
  minute: '2-digit',
});

/** `28 Nov`, with the year when it is not this one. */
export function sayDate(date: string, today: string = todayHere()): string {
  const day = new Date(`${date}T12:00:00Z`);
  return date.slice(0, 4) === today.slice(0, 4) ? names.format(day) : withYear.format(day);
}

/** An instant as date and time where the reader is: `28 November at 16:05`. */
export function sayInstant(instant: string): string {
  return moment.format(new Date(instant));
}

/** Today's calendar date where the reader is. */
export function todayHere(now: Date = new Date()): string {
  const two = (value: number) => String(value).padStart(2, '0');
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`;
}
