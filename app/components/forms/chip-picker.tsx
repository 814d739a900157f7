import { Search } from 'lucide-react';
import { useId, useState } from 'react';

export type Chip = { value: string; label: string; group: string; words: string };

type Props = {
  legend: string;
  name: string;
  chips: Chip[];
  selected: readonly string[];
  hint?: string;
  error?: string;
  onChange?: (selected: string[]) => void;
};

/** Many small choices as chips with a box to narrow them down. Without scripts it is a plain checklist. */
export function ChipPicker({ legend, name, chips, selected, hint, error, onChange }: Props) {
  const id = useId();
  const [chosen, setChosen] = useState<ReadonlySet<string>>(new Set(selected));
  const [words, setWords] = useState('');
  const asked = words.toLowerCase().split(/\s+/).filter(Boolean);
  const fits = (chip: Chip) => {
    const text = `${chip.label} ${chip.words}`.toLowerCase();
    return chosen.has(chip.value) || asked.every((word) => text.includes(word));
  };
  const groups = [...new Set(chips.map(({ group }) => group))];
  const toggle = (value: string, on: boolean) => {
    const next = new Set(chosen);
    if (on) next.add(value);
    else next.delete(value);
    setChosen(next);
    onChange?.([...next]);
  };
  return (
    <fieldset aria-describedby={error ? `${id}-error` : undefined}>
      <legend className="mb-1 font-semibold">
        {legend}
        <span className="font-normal text-muted"> ({chosen.size} chosen)</span>
      </legend>
      {hint && <p className="mb-1 text-sm text-muted">{hint}</p>}
      <div className="relative mb-2">
        <Search className="pointer-events-none absolute top-3 left-3 size-5 text-muted" aria-hidden />
        <input
          type="search"
          value={words}
          onChange={(event) => setWords(event.target.value)}
          onKeyDown={(event) => {
            if (event.key === 'Enter') event.preventDefault();
          }}
          aria-label={`Narrow down ${legend.toLowerCase()}`}
          placeholder="Type to narrow down"
          className="tap w-full rounded-lg border border-edge bg-surface py-2 pr-3 pl-10 text-base placeholder:text-muted"
        />
      </div>
      <div className="max-h-80 space-y-3 overflow-y-auto rounded-lg border border-line p-3" tabIndex={-1}>
        {groups.map((group) => {
          const shown = chips.filter((chip) => chip.group === group);
          const any = shown.some(fits);
          return (
            <div key={group} hidden={!any}>
              {groups.length > 1 && <p className="eyebrow mb-1">{group}</p>}
              <div className="flex flex-wrap gap-2">
                {shown.map((chip) => (
                  <label
                    key={chip.value}
                    hidden={!fits(chip)}
                    className="tap inline-flex items-center gap-2 rounded-full border border-edge bg-surface px-3 has-checked:border-action has-checked:bg-action-soft has-checked:font-semibold has-focus-visible:outline-3 has-focus-visible:outline-action [&[hidden]]:hidden"
                  >
                    <input
                      type="checkbox"
                      name={name}
                      value={chip.value}
                      checked={chosen.has(chip.value)}
                      onChange={(event) => toggle(chip.value, event.target.checked)}
                      className="size-5 accent-action"
                    />
                    {chip.label}
                  </label>
                ))}
              </div>
            </div>
          );
        })}
        {asked.length > 0 && !chips.some(fits) && (
          <p className="text-muted">Nothing fits. Try fewer letters.</p>
        )}
      </div>
      {error && (
        <p id={`${id}-error`} className="mt-1 font-semibold text-danger">
          {error}
        </p>
      )}
    </fieldset>
  );
}
