/** operation → farm → field. */
export interface Operation {
  id: string;
  name: string;
  state: string | null;
  county: string | null;
}

export interface Farm {
  id: string;
  operationId: string;
  name: string;
}

/** Postal codes of the contiguous states, for choosing where an operation lies. */
export const STATE_CODES = (
  'AL AR AZ CA CO CT DE FL GA IA ID IL IN KS KY LA MA MD ME MI MN MO MS MT NC ND NE NH NJ NM NV NY OH OK OR PA RI SC SD ' +
  'TN TX UT VA VT WA WI WV WY'
).split(' ');

/** How far an operation is in the season being planned. */
export interface OperationProgress extends Operation {
  archived: boolean;
  farmCount: number;
  fieldCount: number;
  areaAcres: number;
  fieldsWithSoilTests: number;
  /** Fields with at least one fact said for the season. */
  fieldsWithFacts: number;
  fieldsScored: number;
  /** State of the season's plan; `null` when there is none yet. */
  planState: string | null;
  growers: { id: string; name: string }[];
  reps: { id: string; name: string }[];
  /** Invitations of growers still open. */
  invitedGrowers: number;
  /** Moment of the last change anybody made, milliseconds; `null` when nobody has. */
  lastActivityAt: number | null;
}
