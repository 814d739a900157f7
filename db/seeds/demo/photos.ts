import type { LinkKey } from '#app/domain/chain/chain.ts';
import type { PhotoRole } from '#app/domain/photos/photo-role.ts';

export type DemoPhoto = { file: string; role: PhotoRole; caption: string };

const pair = (name: string, white: string, uv: string): DemoPhoto[] => [
  { file: `${name}-white.jpg`, role: 'white', caption: white },
  { file: `${name}-uv.jpg`, role: 'uv', caption: uv },
];

/** Rendered pictures; nothing was photographed and no real product is shown. */
export const PAIRS = {
  block: pair('block-fitting', 'Block joint at the manifold, wiped once', 'Dye out of the block joint'),
  clutch: pair('compressor-clutch', 'Clutch side, belt off', 'Slung outwards from behind the hub'),
  coolantClamp: pair('coolant-clamp', 'Hose end under the clamp', 'Weeping under the loose clamp'),
  flareNut: pair('flare-nut', 'Nut at the valve inlet', 'Crack lights up and runs down'),
  flareNutByHand: pair('flare-nut-handheld', 'The same nut, by hand', 'By hand, a little lower'),
  dryBlock: pair('neg-block-fitting', 'Block joint, old coolant stain', 'No dye here, only the stain'),
  drySwitch: pair('neg-pressure-switch', 'Switch on the liquid line', 'Dry: nothing glows'),
  pressureSwitch: pair('pressure-switch', 'Switch before', 'Ring of dye under the hex'),
  drier: pair('receiver-drier', 'Drier inlet', 'Inlet fitting loose, oil down the bottle'),
} as const;

export const GAUGES = {
  vacuum: { file: 'gauge-deep-vacuum.jpg', role: 'gauge', caption: 'Vacuum before the hold' },
  running: { file: 'gauge-running-normal.jpg', role: 'gauge', caption: 'Running, 1,500 rpm, doors shut' },
  standing: { file: 'gauge-static-equal.jpg', role: 'gauge', caption: 'Standing, both sides equal' },
} as const satisfies Record<string, DemoPhoto>;

/** Which imported cases the pictures belong to. */
export const IMPORTED_PHOTOS: { externalId: string; link: LinkKey; photos: readonly DemoPhoto[] }[] = [
  { externalId: 'BW-1359', link: 'trace', photos: PAIRS.pressureSwitch },
  { externalId: 'BW-1216', link: 'trace', photos: PAIRS.drier },
  { externalId: 'BW-1229', link: 'trace', photos: PAIRS.flareNutByHand },
  { externalId: 'BW-1346', link: 'trace', photos: PAIRS.dryBlock },
];
