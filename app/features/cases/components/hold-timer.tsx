import { useEffect, useState } from 'react';
import { SelectField, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';

type Kept = { startedAt: number; text: string; interval: string };
type Props = { storageKey: string; onText: (text: string) => void };

const MINUTE_MS = 60_000;
const INTERVALS = ['1', '2', '5', '10'].map((value) => ({ value, label: `every ${value} min` }));

function readKept(key: string): Kept | null {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(key) ?? 'null');
    return typeof kept === 'object' && kept !== null && 'startedAt' in kept && 'text' in kept
      ? (kept as Kept)
      : null;
  } catch {
    return null;
  }
}

/**
 * A clock for a vacuum hold: it asks for the gauge at each interval and writes the lines. It counts from the moment it
 * was started and is kept on the device, so that a locked phone or a reload loses nothing.
 */
export function HoldTimer({ storageKey, onText }: Props) {
  const [kept, setKept] = useState<Kept | null>(null);
  const [now, setNow] = useState(0);
  const [reading, setReading] = useState('');
  const [interval, setChosen] = useState('2');
  useEffect(() => {
    const found = readKept(storageKey);
    if (found) {
      setKept(found);
      onText(found.text);
    }
  }, [storageKey, onText]);
  useEffect(() => {
    if (!kept) return;
    setNow(Date.now());
    const tick = setInterval(() => setNow(Date.now()), 1000);
    return () => clearInterval(tick);
  }, [kept]);
  const keep = (next: Kept | null) => {
    setKept(next);
    if (next) localStorage.setItem(storageKey, JSON.stringify(next));
    else localStorage.removeItem(storageKey);
  };
  if (!kept) {
    return (
      <div className="flex flex-wrap items-end gap-3">
        <div className="w-44">
          <SelectField
            name="interval"
            label="Ask me"
            options={INTERVALS}
            value={interval}
            onChange={setChosen}
          />
        </div>
        <Button
          type="button"
          variant="secondary"
          onClick={() => keep({ startedAt: Date.now(), text: '', interval })}
        >
          Start the clock
        </Button>
      </div>
    );
  }
  const minutes = Math.max(now - kept.startedAt, 0) / MINUTE_MS;
  const taken = kept.text.split('\n').filter(Boolean).length;
  const due = minutes >= taken * Number(kept.interval);
  const note = () => {
    if (reading.trim() === '') return;
    const text = `${kept.text}${((Date.now() - kept.startedAt) / MINUTE_MS).toFixed(2)} ${reading.trim()}\n`;
    keep({ ...kept, text });
    onText(text);
    setReading('');
  };
  return (
    <div className="space-y-3 rounded-xl bg-raised p-4">
      <p className="figures text-2xl font-semibold" role="timer">
        {Math.floor(minutes)}:{String(Math.floor((minutes % 1) * 60)).padStart(2, '0')}
        <span className="pl-3 text-base font-normal" role="status">
          {due ? 'Read the gauge now.' : `Next at ${taken * Number(kept.interval)} min.`}
        </span>
      </p>
      <div className="flex flex-wrap items-end gap-3">
        <div className="w-40">
          <TextField
            name="now"
            label="Gauge now"
            inputMode="decimal"
            value={reading}
            onChange={(event) => setReading(event.target.value)}
            autoComplete="off"
          />
        </div>
        <Button type="button" onClick={note}>
          Note it
        </Button>
        <Button type="button" variant="quiet" onClick={() => keep(null)}>
          Stop the clock
        </Button>
      </div>
    </div>
  );
}
