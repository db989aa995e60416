const formats = new Map<string, Intl.DateTimeFormat>();

function formatFor(zone: string): Intl.DateTimeFormat {
  const known = formats.get(zone);
  if (known) return known;
  const made = new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
  });
  formats.set(zone, made);
  return made;
}

/** The civil day of an instant in an IANA zone, YYYY-MM-DD. Throws RangeError for a zone that isn't one. */
export function civilDay(at: Date, zone: string): string {
  const parts = formatFor(zone).formatToParts(at);
  const part = (type: 'year' | 'month' | 'day'): string =>
    parts.find((each) => each.type === type)?.value ?? '';
  return `${part('year').padStart(4, '0')}-${part('month')}-${part('day')}`;
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const;

/** A civil day as it is printed: 3 Apr 2027. */
export function dayWords(day: string): string {
  const [year = '', month = '', date = ''] = day.split('-');
  return `${Number(date)} ${MONTHS[Number(month) - 1] ?? month} ${year}`;
}

/** Whole months from one civil day to a later one, by the calendar: 31 January to 28 February is none yet. */
export function monthsBetween(from: string, to: string): number {
  const [fromYear = 0, fromMonth = 0, fromDate = 0] = from.split('-').map(Number);
  const [toYear = 0, toMonth = 0, toDate = 0] = to.split('-').map(Number);
  return (toYear - fromYear) * 12 + toMonth - fromMonth - (toDate < fromDate ? 1 : 0);
}
