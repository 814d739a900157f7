import type { Actor } from '#app/domain/permissions/actor.ts';
import { addComment, saySameOnMine } from '#app/features/cases/commands.server.ts';
import {
  answerFlag,
  flagWriteUp,
  publishWriteUp,
  withdrawWriteUp,
} from '#app/features/write-ups/commands.server.ts';
import { Case, WriteUpFlag } from '#db/models/index.ts';
import { accepted, type Crew } from './live-cases.server.ts';

/** Comments, flags, a revision and a withdrawal on cases that came in with the import. */
export async function talkOnImported(
  { rhedyn, jesk, tamsel }: Crew,
  hoursAgo: (hours: number) => Date,
  ottolie: Actor,
) {
  const rows = await Case.findAll({
    where: { externalId: ['BW-1318', 'BW-1325', 'BW-1268', 'BW-1359', 'BW-1336'], shopId: tamsel.shopId },
  });
  const numbers = new Map(rows.map(({ externalId, number }) => [externalId, number]));
  const on = (actor: Actor, externalId: string) => ({ actor, number: numbers.get(externalId) ?? 0 });
  accepted(
    await addComment(on(rhedyn, 'BW-1318'), 'Had my doubts about that switch for years.', hoursAgo(900)),
  );
  accepted(
    await addComment(on(jesk, 'BW-1318'), 'same bin of o rings i think. threw the rest out', hoursAgo(880)),
  );
  accepted(
    await saySameOnMine(
      on(jesk, 'BW-1318'),
      { machine: 'W07', note: 'Same switch, same ring, two weeks later.' },
      hoursAgo(870),
    ),
  );
  accepted(
    await addComment(
      on(ottolie, 'BW-1359'),
      'Part came on the Tuesday van, invoice is filed.',
      hoursAgo(500),
    ),
  );
  accepted(
    await flagWriteUp(
      on(jesk, 'BW-1325'),
      'Which torque? The note says snug, the next one will not know what that is.',
      hoursAgo(300),
    ),
  );
  const flagged = await WriteUpFlag.findOne({ where: { shopId: tamsel.shopId }, rejectOnEmpty: true });
  accepted(
    await answerFlag(
      on(tamsel, 'BW-1325'),
      flagged.id,
      'Fair. The maker’s manual has the figure for this port; look it up each time, it differs by make.',
      hoursAgo(290),
    ),
  );
  accepted(
    await flagWriteUp(
      on(rhedyn, 'BW-1268'),
      'The switch is on the other line on the newer ones.',
      hoursAgo(30),
    ),
  );
  accepted(
    await withdrawWriteUp(
      on(tamsel, 'BW-1336'),
      'Superseded: the later case shows that the cap was not the cause.',
      hoursAgo(200),
    ),
  );
  const revised = `Look under the switch before anything else on this model.\n\n1. Lamp under the hex.\n2. Detector below it, engine off.\n3. New ring, oiled, and a new switch if the thread is marked.\n`;
  accepted(
    await publishWriteUp(
      on(tamsel, 'BW-1318'),
      {
        input: { title: 'Switch first, then the rest', body: revised, photos: [], version: undefined },
        override: 'Earlier record; the pictures are with the paper job card.',
      },
      hoursAgo(150),
    ),
  );
}
