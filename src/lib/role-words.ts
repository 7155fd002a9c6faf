import type { Role } from '#contracts/common.ts';

export const roleWord: Record<Role, string> = {
  owner: 'owner',
  lead: 'paint lead',
  painter: 'painter',
  office: 'office',
};
