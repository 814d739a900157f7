import { z } from 'zod';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { isUnit, type Quantity, UNITS } from '#app/domain/units/units.ts';
import { User } from '#db/models/index.ts';

const unitOf = (quantity: Quantity) =>
  z.string().refine((unit) => isUnit(unit) && UNITS[unit].quantity === quantity, 'Choose a unit.');

export const unitsSchema = z.object({
  pressure: unitOf('pressure'),
  temperature: unitOf('temperature'),
  mass: unitOf('mass'),
  volume: unitOf('volume'),
});

/** Sets the units that a person's forms start with. What was entered before keeps its own. */
export async function saveUnits(actor: Actor, units: z.infer<typeof unitsSchema>): Promise<void> {
  const user = await User.findByPk(actor.userId, { rejectOnEmpty: true });
  const preferences = { ...user.preferences, units } as User['preferences'];
  await user.update({ preferences });
}
