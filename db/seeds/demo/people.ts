import type { Role } from '#app/domain/permissions/actor.ts';

export const demoPassword = 'weepmark-demo';

export type DemoPerson = { name: string; email: string; role: Role; shop: 'brackwater' | 'farside' };

export const demoShops = { brackwater: 'Brackwater Plant Hire', farside: 'Farside Fleet' } as const;

export const demoPeople: DemoPerson[] = [
  { name: 'Rhedyn', email: 'tech@brackwater.example', role: 'tech', shop: 'brackwater' },
  { name: 'Jesk', email: 'tech2@brackwater.example', role: 'tech', shop: 'brackwater' },
  { name: 'Tamsel', email: 'lead@brackwater.example', role: 'lead', shop: 'brackwater' },
  { name: 'Ottolie', email: 'office@brackwater.example', role: 'office', shop: 'brackwater' },
  { name: 'Marrick', email: 'admin@brackwater.example', role: 'admin', shop: 'brackwater' },
  { name: 'Perrin', email: 'lead@farside.example', role: 'lead', shop: 'farside' },
  { name: 'Sorrel', email: 'tech@farside.example', role: 'tech', shop: 'farside' },
];
