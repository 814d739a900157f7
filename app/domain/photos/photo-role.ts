export const PHOTO_ROLES = ['white', 'uv', 'gauge', 'part', 'plate', 'port'] as const;
export type PhotoRole = (typeof PHOTO_ROLES)[number];

export const PHOTO_ROLE_NAMES: Record<PhotoRole, string> = {
  white: 'White light',
  uv: 'UV',
  gauge: 'Gauge',
  part: 'Part off the machine',
  plate: 'Plate',
  port: 'Port',
};
