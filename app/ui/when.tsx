const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']
const two = (n: number) => String(n).padStart(2, '0')

/** A day, and the time when asked. In UTC, so that server and page say the same. */
export function sayWhen(date: Date, time = true): string {
  const day = `${date.getUTCDate()} ${MONTHS[date.getUTCMonth()]} ${date.getUTCFullYear()}`
  return time ? `${day}, ${two(date.getUTCHours())}:${two(date.getUTCMinutes())}` : day
}

export const When = ({ date, time }: { date: Date; time?: boolean }) => (
  <time dateTime={date.toISOString()} title={`${sayWhen(date)} UTC`}>
    {sayWhen(date, time)}
  </time>
)
