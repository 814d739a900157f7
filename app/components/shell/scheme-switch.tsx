import { Flashlight, Monitor, Sun } from 'lucide-react';
import { Form, useLocation } from 'react-router';
import type { Scheme } from '#app/domain/units/preferences.ts';

const CHOICES = [
  { value: 'system', label: 'As the device', Icon: Monitor },
  { value: 'daylight', label: 'Daylight', Icon: Sun },
  { value: 'lamp', label: 'Lamp', Icon: Flashlight },
] as const;

/** Daylight for the yard, Lamp for the dark shop. Works without scripts. */
export function SchemeSwitch({ scheme }: { scheme: Scheme }) {
  const { pathname, search } = useLocation();
  return (
    <Form method="post" action="/scheme" className="flex gap-1" preventScrollReset>
      <input type="hidden" name="to" value={`${pathname}${search}`} />
      {CHOICES.map(({ value, label, Icon }) => (
        <button
          type="submit"
          key={value}
          name="scheme"
          value={value}
          aria-pressed={scheme === value}
          title={label}
          className="tap grid place-items-center rounded-lg border border-transparent hover:bg-raised aria-pressed:border-edge aria-pressed:bg-raised"
        >
          <Icon className="size-5" aria-hidden />
          <span className="sr-only">{label}</span>
        </button>
      ))}
    </Form>
  );
}
