const time = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });
const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short' });
const dayOfYear = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric' });

/** An instant as people say it: "Today 12:04", "Yesterday 9:30", "26 Nov", "26 Nov 2024". */
export function momentText(instant: string, now = new Date()): string {
  const at = new Date(instant);
  const daysAgo = Math.round((startOfDay(now) - startOfDay(at)) / 86_400_000);
  if (daysAgo === 0) return `Today ${time.format(at)}`;
  if (daysAgo === 1) return `Yesterday ${time.format(at)}`;
  if (daysAgo === -1) return `Tomorrow ${time.format(at)}`;
  return at.getFullYear() === now.getFullYear() ? day.format(at) : dayOfYear.format(at);
}

/** Local midnight; noon of both days would do as well, but not a fixed number of hours: days have 23 to 25. */
function startOfDay(date: Date): number {
  return new Date(date.getFullYear(), date.getMonth(), date.getDate()).getTime();
}
