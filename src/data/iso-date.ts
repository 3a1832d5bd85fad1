const SHAPE = /^(\d{4})-(\d\d)-(\d\d)(?:[T ](\d\d):(\d\d)(?::(\d\d)(?:[.,](\d{1,9}))?)?(Z|[+-]\d\d(?::?\d\d)?)?)?$/;
const MINUTE = 60_000;

/**
 * The moment an ISO 8601 date or date-time stands for; a time without a zone is read as UTC, so that the answer is the
 * same on every machine.
 *
 * @param text a whole cell
 * @returns milliseconds since 1970-01-01T00:00Z, or null where the text is not a date of that form or names a day or
 *   an hour that does not exist
 * @source ISO 8601-1:2019, calendar dates in extended format; common practice for a space in place of T
 * @checked by hand, exactly
 */
export function isoMoment(text: string): number | null {
  const match = SHAPE.exec(text);
  if (match === null) return null;
  const [, year, month, day, hour, minute, second, fraction, zone] = match;
  const date = Date.UTC(2000, Number(month) - 1, Number(day));
  if (Number(month) > 12 || Number(day) > daysIn(Number(year), Number(month)) || Number(day) < 1) return null;
  if (Number(month) < 1 || Number(hour ?? 0) > 23 || Number(minute ?? 0) > 59 || Number(second ?? 0) > 59) return null;
  const offset = zoneMinutes(zone);
  if (offset === null) return null;
  // setUTCFullYear, because Date.UTC takes the years 0 to 99 for 1900 to 1999.
  const midnight = new Date(date).setUTCFullYear(Number(year), Number(month) - 1, Number(day));
  const clock = (Number(hour ?? 0) * 60 + Number(minute ?? 0)) * MINUTE + Number(second ?? 0) * 1000;
  return midnight + clock + Number(`0.${fraction ?? 0}`) * 1000 - offset * MINUTE;
}

function daysIn(year: number, month: number): number {
  if (month === 2) return (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0 ? 29 : 28;
  return [4, 6, 9, 11].includes(month) ? 30 : 31;
}

function zoneMinutes(zone: string | undefined): number | null {
  if (zone === undefined || zone === 'Z') return 0;
  const hours = Number(zone.slice(1, 3));
  const minutes = Number(zone.slice(3).replace(':', '') || 0);
  if (hours > 23 || minutes > 59) return null;
  return (zone.startsWith('-') ? -1 : 1) * (hours * 60 + minutes);
}
