/**
 * A length of time such as a person says it.
 *
 * @param seconds  0 or more
 * @returns        "40 seconds", "12 minutes", "3 hours", "9 days", "1,200 years"
 */
export function timeInWords(seconds: number): string {
  if (seconds < 90) return counted(Math.max(1, seconds), "second");
  if (seconds < 90 * 60) return counted(seconds / 60, "minute");
  if (seconds < 48 * 3600) return counted(seconds / 3600, "hour");
  return seconds < 730 * 86400 ? counted(seconds / 86400, "day") : counted(seconds / 86400 / 365.25, "year");
}

function counted(number: number, unit: string): string {
  const whole = Math.round(number);
  return `${String(whole).replace(/\B(?=(\d{3})+(?!\d))/g, ",")} ${unit}${whole === 1 ? "" : "s"}`;
}
