import { diffWordsWithSpace } from 'diff';
import { QueryTypes } from 'sequelize';
import { lackingForCause, lackingForCure } from '#app/domain/chain/chain.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { WRITE_UP_STATE_NAMES, type WriteUpState } from '#app/domain/write-ups/write-up-state.ts';
import { findCaseRow } from '#app/features/cases/change-case.server.ts';
import { caseRecord, loadEvidence } from '#app/features/cases/evidence.server.ts';
import { rankCases } from '#app/features/find/candidates.server.ts';
import { prepareQuery } from '#app/features/find/query.server.ts';
import { NotFound } from '#app/features/outcome.ts';
import { listPhotosById } from '#app/features/photos/queries.server.ts';
import { sequelize } from '#db/connection.server.ts';
import { Case, Machine, WriteUp, WriteUpFlag, WriteUpRemark, WriteUpRevision } from '#db/models/index.ts';
import { mayWrite } from './commands.server.ts';
import { renderNote } from './markdown.server.ts';
import type { WriteUpListInput } from './schema.ts';

const PAGE_SIZE = 20;

export type WriteUpRowView = {
  slug: string;
  caseNumber: number;
  title: string;
  state: WriteUpState;
  authorName: string;
  updatedAt: string;
  machine: string;
  opening: string;
};

type Row = Omit<WriteUpRowView, 'updatedAt' | 'opening'> & { caseId: number; updatedAt: Date; body: string };

/** The shop's notes; with words to look for, the published ones that match, best first. */
export async function listWriteUps(actor: Actor, { q, state, page }: WriteUpListInput) {
  const asked = q.trim();
  const where: string[] = ['w.shopId = :shopId'];
  let ranked: number[] | null = null;
  if (asked) {
    const { terms } = await prepareQuery(actor.shopId, asked);
    ranked = (await rankCases(actor.shopId, terms, { onlyNoted: true })).map(({ caseId }) => caseId);
    where.push('w.caseId IN (:caseIds)');
  } else if (state) where.push('w.state = :state');
  const replacements = { shopId: actor.shopId, state, caseIds: ranked?.length ? ranked : [0] };
  const condition = where.join(' AND ');
  const [count] = await sequelize.query<{ total: number }>(
    `SELECT COUNT(*) AS total FROM write_ups w WHERE ${condition}`,
    {
      replacements,
      type: QueryTypes.SELECT,
    },
  );
  const order = ranked ? 'FIELD(w.caseId, :caseIds)' : 'w.updatedAt DESC, w.id DESC';
  const rows = await sequelize.query<Row>(
    `SELECT w.slug, w.caseId, c.number AS caseNumber, w.title, w.state, w.authorName, w.updatedAt, w.body,
            CONCAT(m.number, ' ', m.make, ' ', m.model) AS machine
       FROM write_ups w JOIN cases c ON c.id = w.caseId JOIN machines m ON m.id = c.machineId
      WHERE ${condition} ORDER BY ${order} LIMIT ${PAGE_SIZE} OFFSET :offset`,
    { replacements: { ...replacements, offset: (page - 1) * PAGE_SIZE }, type: QueryTypes.SELECT },
  );
  const total = Number(count?.total ?? 0);
  return {
    total,
    pageCount: Math.ceil(total / PAGE_SIZE),
    writeUps: rows.map(
      ({ body, caseId: _caseId, updatedAt, ...row }): WriteUpRowView => ({
        ...row,
        updatedAt: updatedAt.toISOString(),
        opening: plainOpening(body),
      }),
    ),
  };
}

function plainOpening(markdown: string): string {
  const plain = markdown
    .replace(/^#+\s.*$/gm, '')
    .replace(/[*_`>#|]/g, '')
    .replace(/\s+/g, ' ')
    .trim();
  return plain.length > 180 ? `${plain.slice(0, 180).replace(/\s\S*$/, '')} …` : plain;
}

/** What the page that writes a case's note shows. */
export async function loadNoteDesk(actor: Actor, number: number) {
  const row = await findCaseRow(actor, number);
  const note = await WriteUp.findOne({ where: { caseId: row.id } });
  const record = caseRecord(row, await loadEvidence(row.id));
  const remarks = note
    ? await WriteUpRemark.findAll({ where: { writeUpId: note.id }, order: [['id', 'DESC']] })
    : [];
  return {
    note: note && {
      slug: note.slug,
      title: note.title,
      body: note.body,
      html: renderNote(note.body),
      photoIds: note.photoIds,
      state: note.state,
      stateName: WRITE_UP_STATE_NAMES[note.state],
      authorName: note.authorName,
      version: note.version,
      withdrawnReason: note.withdrawnReason,
    },
    remarks: remarks.map(({ id, body, byName, at }) => ({ id, body, byName, at: at.toISOString() })),
    lacks: { cause: lackingForCause(record), cure: lackingForCure(record) },
    suggestedTitle: row.title,
    may: {
      write: note ? mayWrite(actor, note) : may(actor.role, 'write-up:write'),
      review: may(actor.role, 'write-up:review'),
      override: may(actor.role, 'gate:override'),
    },
  };
}

/** A note as it is read: published ones by all, others by those who work on them. */
export async function loadWriteUp(actor: Actor, slug: string) {
  const note = await WriteUp.findOne({ where: { shopId: actor.shopId, slug } });
  if (!note) throw new NotFound();
  const row = await Case.findByPk(note.caseId, { rejectOnEmpty: true });
  const machine = await Machine.findByPk(row.machineId, { rejectOnEmpty: true });
  const revisions = await WriteUpRevision.findAll({
    where: { writeUpId: note.id },
    order: [['number', 'ASC']],
  });
  const flags = await WriteUpFlag.findAll({ where: { writeUpId: note.id }, order: [['id', 'DESC']] });
  return {
    caseNumber: row.number,
    caseTitle: row.title,
    machine: { id: machine.id, label: `${machine.number} ${machine.make} ${machine.model}`.trim() },
    slug: note.slug,
    title: note.title,
    html: renderNote(note.body),
    state: note.state,
    stateName: WRITE_UP_STATE_NAMES[note.state],
    authorName: note.authorName,
    publishedAt: note.publishedAt?.toISOString() ?? null,
    withdrawnReason: note.withdrawnReason,
    photos: await listPhotosById(actor, note.photoIds),
    revisions: revisions
      .map((revision, place) => ({
        number: revision.number,
        byName: revision.byName,
        publishedAt: revision.publishedAt.toISOString(),
        changes: place === 0 ? null : changesBetween(revisions[place - 1] as WriteUpRevision, revision),
      }))
      .reverse(),
    flags: flags.map(({ id, body, byName, at, answer, answeredByName, answeredAt }) => ({
      id,
      body,
      byName,
      at: at.toISOString(),
      answer,
      answeredByName,
      answeredAt: answeredAt?.toISOString() ?? null,
    })),
    may: { flag: may(actor.role, 'write-up:flag'), review: may(actor.role, 'write-up:review') },
  };
}

export type ChangedPart = { text: string; kind: 'same' | 'added' | 'removed' };
const KEPT_AROUND = 120;

/** What changed from one revision to the next, word by word; long unchanged stretches are shortened. */
function changesBetween(before: WriteUpRevision, after: WriteUpRevision): ChangedPart[] {
  const text = ({ title, body }: WriteUpRevision) => `${title}\n\n${body}`;
  return (
    diffWordsWithSpace(text(before), text(after), { maxEditLength: 4000, timeout: 500 })?.map(
      ({ value, added, removed }) => ({
        text:
          added || removed || value.length < KEPT_AROUND * 3
            ? value
            : `${value.slice(0, KEPT_AROUND)} … ${value.slice(-KEPT_AROUND)}`,
        kind: added ? 'added' : removed ? 'removed' : 'same',
      }),
    ) ?? [
      { text: text(before), kind: 'removed' },
      { text: text(after), kind: 'added' },
    ]
  );
}
