import {
  type InputHTMLAttributes,
  type ReactNode,
  type TextareaHTMLAttributes,
  useEffect,
  useId,
  useRef,
} from 'react';
import type { FieldErrors } from '#app/features/outcome.ts';

type Labelled = { label: string; hint?: ReactNode; error?: string; optional?: boolean };

const INPUT =
  'tap w-full rounded-lg border bg-surface px-3 py-2 text-base text-ink placeholder:text-muted disabled:opacity-60';
const edge = (error?: string) => (error ? 'border-danger border-2' : 'border-edge');

/** Label, hint and error of one control, joined to it for screen readers. */
function Field({
  label,
  hint,
  error,
  optional,
  children,
}: Labelled & {
  children: (ids: { id: string; describedBy: string | undefined; invalid: true | undefined }) => ReactNode;
}) {
  const id = useId();
  const describedBy =
    [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ') || undefined;
  return (
    <div>
      <label htmlFor={id} className="mb-1 block font-semibold">
        {label}
        {optional && <span className="font-normal text-muted"> (if known)</span>}
      </label>
      {hint && (
        <p id={`${id}-hint`} className="mb-1 text-sm text-muted">
          {hint}
        </p>
      )}
      {children({ id, describedBy, invalid: error ? true : undefined })}
      {error && (
        <p id={`${id}-error`} className="mt-1 font-semibold text-danger">
          {error}
        </p>
      )}
    </div>
  );
}

type TextFieldProps = Labelled & Omit<InputHTMLAttributes<HTMLInputElement>, 'id'> & { name: string };

export function TextField({ label, hint, error, optional, className = '', ...input }: TextFieldProps) {
  return (
    <Field label={label} hint={hint} error={error} optional={optional}>
      {({ id, describedBy, invalid }) => (
        <input
          type="text"
          {...input}
          id={id}
          aria-describedby={describedBy}
          aria-invalid={invalid}
          className={`${INPUT} ${edge(error)} ${className}`}
        />
      )}
    </Field>
  );
}

type TextAreaProps = Labelled & Omit<TextareaHTMLAttributes<HTMLTextAreaElement>, 'id'> & { name: string };

export function TextArea({ label, hint, error, optional, className = '', ...area }: TextAreaProps) {
  return (
    <Field label={label} hint={hint} error={error} optional={optional}>
      {({ id, describedBy, invalid }) => (
        <textarea
          rows={4}
          {...area}
          id={id}
          aria-describedby={describedBy}
          aria-invalid={invalid}
          className={`${INPUT} ${edge(error)} ${className}`}
        />
      )}
    </Field>
  );
}

export type Option = { value: string; label: string };
export type OptionGroup = { label: string; options: Option[] };

type SelectProps = Labelled & {
  name: string;
  options?: Option[];
  groups?: OptionGroup[];
  blank?: string;
  defaultValue?: string;
  value?: string;
  onChange?: (value: string) => void;
};

export function SelectField({
  label,
  hint,
  error,
  optional,
  name,
  options,
  groups,
  blank,
  value,
  onChange,
  ...rest
}: SelectProps) {
  return (
    <Field label={label} hint={hint} error={error} optional={optional}>
      {({ id, describedBy, invalid }) => (
        <select
          {...rest}
          value={value}
          onChange={onChange && ((event) => onChange(event.target.value))}
          id={id}
          name={name}
          aria-describedby={describedBy}
          aria-invalid={invalid}
          className={`${INPUT} ${edge(error)}`}
        >
          {blank !== undefined && <option value="">{blank}</option>}
          {options?.map((option) => (
            <option key={option.value} value={option.value}>
              {option.label}
            </option>
          ))}
          {groups?.map((group) => (
            <optgroup key={group.label} label={group.label}>
              {group.options.map((option) => (
                <option key={option.value} value={option.value}>
                  {option.label}
                </option>
              ))}
            </optgroup>
          ))}
        </select>
      )}
    </Field>
  );
}

type MeasureProps = Labelled & {
  name: string;
  unitName: string;
  units: Option[];
  defaultValue?: string;
  defaultUnit?: string;
  unitError?: string;
};

/** A number as read, and the unit that the gauge shows. */
export function MeasureField({
  name,
  unitName,
  units,
  defaultValue,
  defaultUnit,
  unitError,
  error,
  ...labelled
}: MeasureProps) {
  return (
    <Field {...labelled} error={error ?? unitError}>
      {({ id, describedBy, invalid }) => (
        <div className="flex gap-2">
          <input
            id={id}
            name={name}
            type="text"
            inputMode="decimal"
            autoComplete="off"
            defaultValue={defaultValue}
            aria-describedby={describedBy}
            aria-invalid={invalid}
            className={`${INPUT} ${edge(error)} figures min-w-0 flex-1`}
          />
          <select
            name={unitName}
            defaultValue={defaultUnit}
            aria-label={`Unit of ${labelled.label.toLowerCase()}`}
            aria-invalid={unitError ? true : undefined}
            className={`${INPUT} ${edge(unitError)} w-auto max-w-44`}
          >
            {units.map((unit) => (
              <option key={unit.value} value={unit.value}>
                {unit.label}
              </option>
            ))}
          </select>
        </div>
      )}
    </Field>
  );
}

type CheckboxProps = {
  name: string;
  label: ReactNode;
  value?: string;
  defaultChecked?: boolean;
  hint?: string;
};

export function CheckboxField({ label, hint, ...input }: CheckboxProps) {
  return (
    <label className="tap flex items-start gap-3 py-2">
      <input type="checkbox" {...input} className="mt-0.5 size-6 shrink-0 accent-action" />
      <span>
        {label}
        {hint && <span className="block text-sm text-muted">{hint}</span>}
      </span>
    </label>
  );
}

type RadioCardsProps = {
  legend: string;
  name: string;
  options: (Option & { hint?: string })[];
  defaultValue?: string;
  error?: string;
};

/** A choice of a few, as large targets. */
export function RadioCards({ legend, name, options, defaultValue, error }: RadioCardsProps) {
  const id = useId();
  return (
    <fieldset aria-describedby={error ? `${id}-error` : undefined}>
      <legend className="mb-1 font-semibold">{legend}</legend>
      <div className="flex flex-wrap gap-2">
        {options.map(({ value, label, hint }) => (
          <label
            key={value}
            className="tap flex flex-1 basis-40 items-center gap-3 rounded-lg border border-edge bg-surface px-3 py-2 has-checked:border-action has-checked:bg-action-soft"
          >
            <input
              type="radio"
              name={name}
              value={value}
              defaultChecked={value === defaultValue}
              className="size-5 shrink-0 accent-action"
            />
            <span>
              {label}
              {hint && <span className="block text-sm text-muted">{hint}</span>}
            </span>
          </label>
        ))}
      </div>
      {error && (
        <p id={`${id}-error`} className="mt-1 font-semibold text-danger">
          {error}
        </p>
      )}
    </fieldset>
  );
}

/** What is wrong, above the form; focus comes here so that nobody has to search. */
export function FormErrors({ errors }: { errors: FieldErrors }) {
  const box = useRef<HTMLDivElement>(null);
  const entries = Object.entries(errors);
  const text = entries.map(([name, message]) => `${name} ${message}`).join('\n');
  useEffect(() => {
    if (text) box.current?.focus();
  }, [text]);
  if (entries.length === 0) return null;
  return (
    <div
      ref={box}
      role="alert"
      tabIndex={-1}
      className="rounded-r-lg border-l-4 border-danger bg-danger-soft px-4 py-3"
    >
      <p className="font-semibold">Not saved yet. What you typed is still here.</p>
      <ul className="mt-1 list-disc pl-5">
        {entries.map(([name, message]) => (
          <li key={name}>{message}</li>
        ))}
      </ul>
    </div>
  );
}
