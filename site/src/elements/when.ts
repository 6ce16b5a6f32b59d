/** A time for show, in the reader's own time zone; the text itself where it is no time. */
export function when(time: string): string {
  const date = new Date(time);
  return Number.isNaN(date.getTime()) ? time : date.toLocaleString('en-GB', { dateStyle: 'medium', timeStyle: 'short' });
}
