/** People, roles and what each role may do. Pure: asked by server and screen alike. */

export const ROLES = ['grower', 'rep', 'manager'] as const;
export type Role = (typeof ROLES)[number];

/** The signed-in person. Every query takes one first and filters by what they may see. */
export interface Viewer {
  personId: string;
  dealershipId: string;
  dealershipName: string;
  /** The season (crop year) being planned by the dealership. */
  season: number;
  role: Role;
  name: string;
  email: string;
}
