export const ROLES = ['customer', 'butcher', 'packer', 'owner'] as const;
export type Role = (typeof ROLES)[number];

/** Who may call an endpoint: everyone, anyone signed in, or the roles named. */
export type Access = 'public' | 'signed-in' | readonly Role[];

export function mayCall(access: Access, role: Role | null): boolean {
  if (access === 'public') return true;
  if (role === null) return false;
  return access === 'signed-in' || access.includes(role);
}
