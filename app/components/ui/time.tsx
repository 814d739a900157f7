const DAY = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  timeZone: 'UTC',
});
const MINUTE = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  hour: '2-digit',
  minute: '2-digit',
  timeZone: 'UTC',
});

/** A day, the same on server and browser. */
export function Day({ value }: { value: string }) {
  return (
    <time dateTime={value} className="figures whitespace-nowrap">
      {DAY.format(new Date(value))}
    </time>
  );
}

/** A day and a time, in UTC, which it says. */
export function DateTime({ value }: { value: string }) {
  return (
    <time dateTime={value} className="figures">
      {MINUTE.format(new Date(value))} UTC
    </time>
  );
}
