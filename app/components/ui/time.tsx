import { useSyncExternalStore } from 'react';

const DAY = { day: 'numeric', month: 'short', year: 'numeric' } as const;
const MINUTE = { ...DAY, hour: '2-digit', minute: '2-digit' } as const;
const UTC_DAY = new Intl.DateTimeFormat('en-GB', { ...DAY, timeZone: 'UTC' });
const UTC_MINUTE = new Intl.DateTimeFormat('en-GB', { ...MINUTE, timeZone: 'UTC' });

const never = () => () => {};

/** Whether the page runs in a browser: first as the server wrote it, then with the device's own clock zone. */
function useOwnZone(): boolean {
  return useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
}

/** A day: the device's own where scripts run, else in UTC. */
export function Day({ value }: { value: string }) {
  const own = useOwnZone();
  const format = own ? new Intl.DateTimeFormat('en-GB', DAY) : UTC_DAY;
  return (
    <time dateTime={value} className="figures whitespace-nowrap">
      {format.format(new Date(value))}
    </time>
  );
}

/** A day and a time: in the device's own zone where scripts run, else in UTC, which it says. */
export function DateTime({ value }: { value: string }) {
  const own = useOwnZone();
  const text = own
    ? new Intl.DateTimeFormat('en-GB', MINUTE).format(new Date(value))
    : `${UTC_MINUTE.format(new Date(value))} UTC`;
  return (
    <time dateTime={value} className="figures">
      {text}
    </time>
  );
}
