export const ROLES = ['tech', 'lead', 'office', 'admin'] as const;
export type Role = (typeof ROLES)[number];

export const ROLE_NAMES: Record<Role, string> = {
  tech: 'Technician',
  lead: 'Lead',
  office: 'Office',
  admin: 'Shop admin',
};

/** Who acts, for which shop. Every query and command takes one and never looks past its shop. */
export type Actor = { userId: number; shopId: number; role: Role; name: string };

export function isRole(value: unknown): value is Role {
  return typeof value === 'string' && (ROLES as readonly string[]).includes(value);
}
