const DAY = 86_400_000;

/**
 * The serial number of a date as strict files write it (`t="d"`): 2024-02-29, 2024-02-29T12:00:00.5, or T12:00:00 alone.
 *
 * @returns  Days since 1899-12-31 with the fictitious 1900-02-29, or since 1904-01-01; NaN if the text is no date.
 * @source   ECMA-376 part 1, 18.17.4 (dates and times).
 */
export function isoDateSerial(text: string, date1904: boolean): number {
  const match = /^(?:(\d{4})-(\d\d)-(\d\d))?(?:T?(\d\d):(\d\d)(?::(\d\d(?:\.\d+)?))?)?Z?$/.exec(text.trim());
  if (!match || match[0].replace('Z', '') === '') return NaN;
  const time = (Number(match[4] ?? 0) * 3600 + Number(match[5] ?? 0) * 60 + Number(match[6] ?? 0)) / 86_400;
  if (match[1] === undefined) return time;
  const day = Date.UTC(Number(match[1]), Number(match[2]) - 1, Number(match[3])) / DAY;
  if (new Date(day * DAY).getUTCDate() !== Number(match[3])) return NaN;
  if (date1904) return day - Date.UTC(1904, 0, 1) / DAY + time;
  const serial = day - Date.UTC(1899, 11, 31) / DAY;
  return (serial >= 60 ? serial + 1 : serial) + time;
}
