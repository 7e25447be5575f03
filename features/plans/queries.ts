import 'server-only';
import { and, asc, desc, eq, isNull, sql } from 'drizzle-orm';
import { database } from '@/db/client';
import { fields, operations, planRows, plans, seedLots, sheetLinks, varieties } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { may } from '@/features/accounts/rights';
import { operationInScope, requireOperation } from '@/features/accounts/scope';
import { NotAllowedError } from '@/lib/errors';
import type { PlanView } from './model';
import { readPlan } from './read';
import { type SeasonBook, seasonBookOf } from './season-book';
import type { PlanState } from './states';
import { askedUnits } from './supply';

/** The plan of an operation in the viewer's scope; an empty draft when none was begun. Growers get no prices and no numbers of supply. */
export async function planOf(viewer: Viewer, operationId: string, season: number): Promise<PlanView> {
  await requireOperation(viewer, operationId);
  if (!may(viewer, 'plan', 'read')) throw new NotAllowedError('Your account may not read plans.');
  return readPlan(operationId, season, { dealershipSide: may(viewer, 'supply', 'read') });
}

export interface PlanSummary {
  operationId: string;
  operationName: string;
  county: string | null;
  state: PlanState | 'not begun';
  fields: number;
  fieldsPlaced: number;
  acres: number;
  acresPlaced: number;
  updatedAt: number | null;
  signedName: string | null;
}

/** One line an operation in the viewer's scope: how far its plan is. */
export async function plansOf(viewer: Viewer, season: number): Promise<PlanSummary[]> {
  const found = await database()
    .select({
      operationId: operations.id,
      operationName: operations.name,
      county: operations.county,
      planId: plans.id,
      state: plans.state,
      updatedAt: plans.updatedAt,
      signedName: plans.signedName,
    })
    .from(operations)
    .leftJoin(plans, and(eq(plans.operationId, operations.id), eq(plans.season, season)))
    .where(and(operationInScope(viewer), isNull(operations.archivedAt)))
    .orderBy(asc(operations.name));
  const land = await database()
    .select({ operationId: fields.operationId, fields: sql<number>`count(*)`, acres: sql<number>`sum(${fields.areaAcres})` })
    .from(fields)
    .where(isNull(fields.archivedAt))
    .groupBy(fields.operationId);
  const placed = await database()
    .select({
      planId: planRows.planId,
      fields: sql<number>`count(distinct ${planRows.fieldId})`,
      acres: sql<number>`sum(${planRows.areaAcres})`,
    })
    .from(planRows)
    .where(sql`${planRows.varietyId} is not null`)
    .groupBy(planRows.planId);
  const landBy = new Map(land.map((one) => [one.operationId, one]));
  const placedBy = new Map(placed.map((one) => [one.planId, one]));
  return found.map((one) => ({
    operationId: one.operationId,
    operationName: one.operationName,
    county: one.county,
    state: one.state ?? 'not begun',
    fields: landBy.get(one.operationId)?.fields ?? 0,
    fieldsPlaced: one.planId ? (placedBy.get(one.planId)?.fields ?? 0) : 0,
    acres: landBy.get(one.operationId)?.acres ?? 0,
    acresPlaced: one.planId ? (placedBy.get(one.planId)?.acres ?? 0) : 0,
    updatedAt: one.updatedAt,
    signedName: one.signedName,
  }));
}

export interface SheetLink {
  id: string;
  createdAt: number;
  expiresAt: number;
  revokedAt: number | null;
}

/** Crew links of a plan, newest first; the token itself is never kept, so it cannot be shown again. */
export async function sheetLinksOf(viewer: Viewer, operationId: string, season: number): Promise<SheetLink[]> {
  await requireOperation(viewer, operationId);
  return database()
    .select({
      id: sheetLinks.id,
      createdAt: sheetLinks.createdAt,
      expiresAt: sheetLinks.expiresAt,
      revokedAt: sheetLinks.revokedAt,
    })
    .from(sheetLinks)
    .innerJoin(plans, eq(plans.id, sheetLinks.planId))
    .where(and(eq(plans.operationId, operationId), eq(plans.season, season)))
    .orderBy(desc(sheetLinks.createdAt));
}

/** The season at a glance: units asked against units on hand, acres by variety and maturity, who has not agreed. Reps see it over their growers' plans, units held over the whole dealership. */
export async function seasonOf(viewer: Viewer, season: number): Promise<SeasonBook> {
  if (!may(viewer, 'season', 'read')) throw new NotAllowedError('The season page is for the dealership’s own people.');
  const summaries = await plansOf(viewer, season);
  const asked = await askedUnits(viewer.dealershipId, season);
  const lineUp = await database()
    .select({
      id: varieties.id,
      code: varieties.code,
      relativeMaturity: varieties.relativeMaturity,
      release: varieties.release,
      published: varieties.published,
      unitsOnHand: sql<number | null>`sum(${seedLots.unitsOnHand})`,
    })
    .from(varieties)
    .leftJoin(seedLots, and(eq(seedLots.varietyId, varieties.id), isNull(seedLots.archivedAt)))
    .where(and(eq(varieties.dealershipId, viewer.dealershipId), eq(varieties.season, season), isNull(varieties.archivedAt)))
    .groupBy(varieties.id)
    .orderBy(asc(varieties.relativeMaturity), asc(varieties.code));
  return seasonBookOf({ season, lineUp, asked, summaries });
}
