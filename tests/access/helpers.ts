import type { Viewer } from '@/features/accounts/model';
import { aDealership, anOperation, aPerson, type MadeDealership } from '../support/viewers';

/** One dealership at work: an operation with its grower and its rep, and the dealership's manager. */
export interface Scenario {
  dealership: MadeDealership;
  operationId: string;
  grower: Viewer;
  rep: Viewer;
  manager: Viewer;
}

export async function aScenario(): Promise<Scenario> {
  const dealership = await aDealership();
  const operation = await anOperation({ dealership });
  return {
    dealership,
    operationId: operation.id,
    grower: await aPerson({ role: 'grower', dealership, operationIds: [operation.id] }),
    rep: await aPerson({ role: 'rep', dealership, operationIds: [operation.id] }),
    manager: await aPerson({ role: 'manager', dealership }),
  };
}

export interface Stranger {
  /** Who it is, for the name of a failing test. */
  who: string;
  viewer: Viewer;
  /** Of the same dealership: may see what belongs to the dealership as a whole, never the scenario's operation. */
  sameDealership: boolean;
}

/** Everybody who must neither see nor change the scenario's operation: each has an operation of their own to mistake it for. */
export async function strangers(scenario: { dealership: MadeDealership }): Promise<Stranger[]> {
  const { dealership } = scenario;
  const neighbour = await anOperation({ dealership });
  const elsewhere = await aDealership();
  const farAway = await anOperation({ dealership: elsewhere });
  return [
    {
      who: 'a grower of another operation',
      viewer: await aPerson({ role: 'grower', dealership, operationIds: [neighbour.id] }),
      sameDealership: true,
    },
    { who: 'a grower of no operation', viewer: await aPerson({ role: 'grower', dealership }), sameDealership: true },
    {
      who: 'a rep not assigned',
      viewer: await aPerson({ role: 'rep', dealership, operationIds: [neighbour.id] }),
      sameDealership: true,
    },
    {
      who: 'a grower of another dealership',
      viewer: await aPerson({ role: 'grower', dealership: elsewhere, operationIds: [farAway.id] }),
      sameDealership: false,
    },
    {
      who: 'a rep of another dealership',
      viewer: await aPerson({ role: 'rep', dealership: elsewhere, operationIds: [farAway.id] }),
      sameDealership: false,
    },
    {
      who: 'a manager of another dealership',
      viewer: await aPerson({ role: 'manager', dealership: elsewhere }),
      sameDealership: false,
    },
  ];
}

/** Did a change refuse? True for a failed outcome and for a thrown not-found or not-allowed; a bug throws on. */
export async function refuses(work: () => Promise<{ ok: boolean }>): Promise<boolean> {
  try {
    return !(await work()).ok;
  } catch (error) {
    if (error instanceof Error && ['NotFoundError', 'NotAllowedError'].includes(error.name)) return true;
    throw error;
  }
}
