/** 300000 → `300 000`, with narrow no-break spaces as ISO 80000-1 groups digits. */
export function countText(value: number): string {
  return String(Math.round(value)).replaceAll(/\B(?=(\d{3})+(?!\d))/g, '\u202f');
}

const byteUnits = ['B', 'kB', 'MB', 'GB', 'TB', 'PB'] as const;

export function byteText(value: number): string {
  let amount = value;
  let unit = 0;
  while (amount >= 1000 && unit < byteUnits.length - 1) {
    amount /= 1000;
    unit++;
  }
  return `${amount >= 100 || unit === 0 ? amount.toFixed(0) : amount.toPrecision(3)} ${byteUnits[unit]}`;
}

const secondsBeforeMinutes = 90;
const secondsBeforeHours = 5400;
const secondsBeforeDays = 48 * 3600;

export function durationText(seconds: number): string {
  if (seconds < 1) return 'under a second';
  if (seconds < secondsBeforeMinutes) return `${Math.round(seconds)} s`;
  if (seconds < secondsBeforeHours) return `${Math.round(seconds / 60)} min`;
  if (seconds < secondsBeforeDays) return `${(seconds / 3600).toFixed(1)} h`;
  return `${(seconds / 86400).toFixed(1)} days`;
}
