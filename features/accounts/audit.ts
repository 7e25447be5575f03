/** What the audit trail can be filtered by: words for people, and how the verbs of that kind begin. */
export const AUDIT_KINDS = [
  { value: 'people', label: 'People and sign-in', begins: ['person.', 'invitation.', 'mail.'] },
  { value: 'operations', label: 'Operations and farms', begins: ['operation.', 'farm.'] },
  { value: 'fields', label: 'Fields and soil', begins: ['field.', 'import.', 'soil.', 'upload.'] },
  { value: 'line-up', label: 'Line-up', begins: ['variety.', 'lot.', 'line-up.'] },
  { value: 'picks', label: 'Picks', begins: ['score.'] },
  { value: 'plans', label: 'Plans', begins: ['plan.', 'sheet.'] },
  { value: 'settings', label: 'Settings', begins: ['dealership.', 'zone.', 'rule.', 'coefficient.', 'station.'] },
] as const;

/** How the verbs of a kind begin; nothing for a kind that is none, which filters nothing. */
export function beginningsOf(kind: string | undefined): readonly string[] {
  return AUDIT_KINDS.find((one) => one.value === kind)?.begins ?? [];
}

/** The place in the trail from which the next page goes on, as it stands in an address: `1766577000000_abc`. */
export function cursorOf(line: { at: number; id: string }): string {
  return `${line.at}_${line.id}`;
}

/** Reads a cursor from an address; `undefined` when it is none. */
export function readCursor(text: string | undefined): { at: number; id: string } | undefined {
  const [, at, id] = /^(\d{1,15})_([a-z0-9]{1,40})$/.exec(text ?? '') ?? [];
  return at && id ? { at: Number(at), id } : undefined;
}
