/** The invented people of the demo. Every password is printed by the start command; none is used anywhere else. */
export const DEMO_DEALERSHIP = { name: 'Otter Prairie Seed', season: 2027 } as const;

export const DEMO_ACCOUNTS = [
  {
    key: 'manager',
    role: 'manager',
    name: 'Ada Quist',
    email: 'manager@otterprairie.example',
    password: 'otter-manager-2027',
    operations: [],
  },
  {
    key: 'rep',
    role: 'rep',
    name: 'Jon Wieland',
    email: 'rep@otterprairie.example',
    password: 'otter-rep-2027',
    operations: ['teal', 'lone'],
  },
  {
    key: 'rep2',
    role: 'rep',
    name: 'Marit Sloan',
    email: 'rep2@otterprairie.example',
    password: 'otter-rep2-2027',
    operations: ['berg'],
  },
  {
    key: 'grower',
    role: 'grower',
    name: 'Lena Aldous',
    email: 'grower@tealcreek.example',
    password: 'teal-creek-2027',
    operations: ['teal'],
  },
  {
    key: 'grower2',
    role: 'grower',
    name: 'Tove Bergan',
    email: 'grower@bergan.example',
    password: 'bergan-sons-2027',
    operations: ['berg'],
  },
  {
    key: 'grower3',
    role: 'grower',
    name: 'Cal Ruan',
    email: 'grower@lonetree.example',
    password: 'lone-tree-2027',
    operations: ['lone'],
  },
] as const;

/** Lines that the start command prints. */
export function demoAccountLines(): string[] {
  return DEMO_ACCOUNTS.map((one) => `  ${one.role.padEnd(8)} ${one.email.padEnd(32)} ${one.password}`);
}
