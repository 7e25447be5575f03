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
