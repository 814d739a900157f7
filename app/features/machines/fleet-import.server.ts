import { parse } from 'csv-parse/sync';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { fieldErrors } from '#app/features/form-fields.ts';
import { Forbidden } from '#app/features/outcome.ts';
import { Machine } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';
import { yardByName } from './commands.server.ts';
import { FLEET_COLUMNS, type MachineInput, machineSchema } from './schema.ts';

const MOST_LINES = 5000;

export type FleetLine = { line: number; machine: MachineInput | null; exists: boolean; errors: string[] };
export type FleetPreview = { fault: string | null; ignored: string[]; lines: FleetLine[] };

/** Reads a fleet file without changing anything: what each line would do, and what is wrong with it. */
export async function previewFleet(actor: Actor, csv: string): Promise<FleetPreview> {
  if (!may(actor.role, 'machine:import')) throw new Forbidden();
  const read = readRows(csv);
  if ('fault' in read) return { fault: read.fault, ignored: [], lines: [] };
  const numbers = read.rows.map(({ number }) => (number ?? '').trim()).filter(Boolean);
  const known = await Machine.findAll({
    where: { shopId: actor.shopId, number: numbers },
    attributes: ['number'],
  });
  const exists = new Set(known.map(({ number }) => number.toLowerCase()));
  const seen = new Map<string, number>();
  const lines = read.rows.map((row, place): FleetLine => {
    const line = place + 2;
    const parsed = machineSchema.safeParse(row);
    if (!parsed.success) {
      const errors = Object.entries(fieldErrors(parsed.error)).map(
        ([name, message]) => `${name}: ${message}`,
      );
      return { line, machine: null, exists: false, errors };
    }
    const key = parsed.data.number.toLowerCase();
    const before = seen.get(key);
    seen.set(key, line);
    const errors = before ? [`number: The same number stands on line ${before}.`] : [];
    return { line, machine: parsed.data, exists: exists.has(key), errors };
  });
  return { fault: null, ignored: read.ignored, lines };
}

/** Loads a whole fleet file or nothing of it; machines that exist are brought up to date. */
export async function importFleet(
  actor: Actor,
  csv: string,
  now: Date,
): Promise<FleetPreview & { loaded: boolean }> {
  const preview = await previewFleet(actor, csv);
  const faulty = preview.fault !== null || preview.lines.some(({ errors }) => errors.length > 0);
  if (faulty) return { ...preview, loaded: false };
  await transact(async (transaction) => {
    for (const { machine } of preview.lines) {
      if (!machine) continue;
      const { yard, ...values } = machine;
      const yardId = await yardByName(actor.shopId, yard, transaction);
      const before = await Machine.findOne({
        where: { shopId: actor.shopId, number: values.number },
        transaction,
      });
      if (before)
        await before.update(
          { ...values, yardId, version: before.version + 1, updatedAt: now },
          { transaction },
        );
      else
        await Machine.create(
          { ...values, yardId, shopId: actor.shopId, createdAt: now, updatedAt: now },
          { transaction },
        );
    }
    await recordAudit(
      { actor, action: 'fleet-imported', subject: 'machine', detail: { lines: preview.lines.length } },
      transaction,
    );
  });
  return { ...preview, loaded: true };
}

type Rows = { rows: Record<string, string>[]; ignored: string[] } | { fault: string };

function readRows(csv: string): Rows {
  const text = csv.replace(/^\ufeff/, '');
  if (text.trim() === '') return { fault: 'The file is empty.' };
  let table: string[][];
  try {
    table = parse(text, {
      delimiter: delimiterOf(text),
      relax_column_count: true,
      skip_empty_lines: true,
      trim: true,
    });
  } catch {
    return { fault: 'This is not a table of comma-separated values: a quotation mark is not closed.' };
  }
  const [headings = [], ...body] = table;
  const columns = headings.map((heading) => {
    const name = heading.toLowerCase();
    return Object.entries(FLEET_COLUMNS).find(([, names]) =>
      (names as readonly string[]).includes(name),
    )?.[0];
  });
  if (!columns.includes('number'))
    return { fault: 'The first line must name the columns; one of them must be “number”.' };
  if (body.length === 0) return { fault: 'There is no machine under the headings.' };
  if (body.length > MOST_LINES)
    return { fault: `At most ${MOST_LINES.toLocaleString('en-GB')} machines at a time.` };
  const rows = body.map((cells) =>
    Object.fromEntries(columns.flatMap((column, place) => (column ? [[column, cells[place] ?? '']] : []))),
  );
  return { rows, ignored: headings.filter((_heading, place) => columns[place] === undefined) };
}

function delimiterOf(text: string): string {
  const first = text.split('\n', 1)[0] ?? '';
  const counts = [',', ';', '\t'].map((mark) => ({ mark, count: first.split(mark).length }));
  return counts.sort((x, y) => y.count - x.count)[0]?.mark ?? ',';
}
