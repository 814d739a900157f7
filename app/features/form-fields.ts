import type { z } from 'zod';
import type { FieldErrors } from './outcome.ts';

/** The first message for each field; the form's own messages under the empty key. */
export function fieldErrors(error: z.ZodError): FieldErrors {
  const fields: FieldErrors = {};
  for (const { path, message } of error.issues) fields[path.join('.')] ??= message;
  return fields;
}

/** What was typed, as text, to give back to a form that was refused. Files and passwords are left out. */
export function typedValues(form: FormData): Record<string, string> {
  const values: Record<string, string> = {};
  for (const [name, value] of form) {
    if (typeof value === 'string' && !name.startsWith('password') && name !== 'again') values[name] = value;
  }
  return values;
}

/** A form as an object for a schema: names in `lists` give every value, the others the last one. */
export function formObject(form: FormData, lists: readonly string[] = []): Record<string, unknown> {
  const object: Record<string, unknown> = {};
  for (const [name, value] of form) object[name] = value;
  for (const name of lists) object[name] = form.getAll(name);
  return object;
}
