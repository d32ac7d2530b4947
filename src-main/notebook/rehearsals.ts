import { decodeFrame, encodeFrame } from '../contract/frame.ts';
import {
  planSchema,
  protocolSchema,
  rigSchema,
  type CellDocument,
  type PlanDocument,
  type ProtocolDocument,
  type RigDocument,
} from '../contract/documents.ts';
import type { Forecast, ListedRehearsal, RehearsalSummary, Trace } from '../contract/results.ts';
import { change, type Notebook } from './open.ts';
import { insertTraces } from './traces.ts';
import { keepVersion } from './versions.ts';
import { missingRecord, readBack, type Written } from './written.ts';

/** A finished rehearsal, with the exact documents it ran on. */
export interface FinishedRehearsal {
  readonly planId: number;
  readonly sessionId: number | null;
  readonly plan: Written<PlanDocument>;
  readonly cell: Written<CellDocument>;
  readonly rig: Written<RigDocument>;
  readonly protocol: Written<ProtocolDocument>;
  readonly engineVersion: string;
  readonly step_us: number;
  readonly compartments: number;
  readonly wall_s: number;
  readonly forecast: Forecast;
  readonly sweeps: number;
  readonly traces: readonly Trace[];
}

/** Stores a rehearsal whole: versions, forecast and traces in one transaction. @throws Refusal as `change`. */
export function storeRehearsal(notebook: Notebook, done: FinishedRehearsal): number {
  return change(notebook, (now) => {
    mustFit(notebook, done);
    const versions = [done.plan, done.cell, done.rig, done.protocol].map((each) => keepVersion(notebook, each, now));
    const made = notebook.db
      .prepare(
        `INSERT INTO rehearsal (plan_id, session_id, plan_version, cell_version, rig_version, protocol_version,
           engine_version, rehearsed_at, sweeps, step_us, compartments, wall_s, forecast)
         VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
      )
      .run(
        done.planId,
        done.sessionId,
        ...versions,
        done.engineVersion,
        now,
        done.sweeps,
        done.step_us,
        done.compartments,
        done.wall_s,
        encodeFrame(done.forecast),
      );
    const rehearsalId = Number(made.lastInsertRowid);
    insertTraces(notebook, rehearsalId, done.traces);
    return rehearsalId;
  });
}

/** The difference the finer run made, once it is known. */
export function storeNumerical(
  notebook: Notebook,
  rehearsalId: number,
  numerical: { readonly clampError_mV: number | null; readonly reach: number | null },
): void {
  change(notebook, () =>
    notebook.db
      .prepare('INSERT INTO numerical (rehearsal_id, clamp_error_mV, reach) VALUES (?, ?, ?) ON CONFLICT DO NOTHING')
      .run(rehearsalId, numerical.clampError_mV, numerical.reach),
  );
}

interface SummaryRow extends Omit<RehearsalSummary, 'hashes'> {
  readonly planHash: string;
  readonly cellHash: string;
  readonly rigHash: string;
  readonly protocolHash: string;
}

const summaryColumns = ` r.rehearsal_id AS rehearsalId, r.plan_id AS planId, p.name AS planName, r.session_id AS sessionId,
    r.rehearsed_at AS rehearsedAt, r.engine_version AS engineVersion, r.sweeps, r.step_us, r.compartments, r.wall_s,
    p.hash AS planHash, c.hash AS cellHash, g.hash AS rigHash, t.hash AS protocolHash`;
const summarySource = `
  FROM rehearsal r
    JOIN version p ON p.version_id = r.plan_version JOIN version c ON c.version_id = r.cell_version
    JOIN version g ON g.version_id = r.rig_version JOIN version t ON t.version_id = r.protocol_version`;

/** A plan's rehearsals with what each was run with, the newest first. @throws Refusal `file-unreadable`. */
export function rehearsalsOfPlan(notebook: Notebook, planId: number): ListedRehearsal[] {
  return notebook.db
    .prepare<[number], SummaryRow & { readonly rig: string; readonly protocol: string }>(
      `SELECT ${summaryColumns}, g.document AS rig, t.document AS protocol ${summarySource} WHERE r.plan_id = ? ORDER BY r.rehearsal_id DESC`,
    )
    .all(planId)
    .map(({ rig, protocol, ...row }) => ({
      ...summaryOf(row),
      rig: readBack(rigSchema, rig, `rehearsal ${row.rehearsalId}`),
      protocol: readBack(protocolSchema, protocol, `rehearsal ${row.rehearsalId}`),
    }));
}

/** The forecast as stored, with the numerical uncertainty that came since. @throws Refusal `notebook-record-missing`. */
export function readRehearsal(
  notebook: Notebook,
  rehearsalId: number,
): { readonly summary: RehearsalSummary; readonly forecast: Forecast; readonly plan: PlanDocument } {
  const row = notebook.db
    .prepare<[number], SummaryRow>(`SELECT ${summaryColumns} ${summarySource} WHERE r.rehearsal_id = ?`)
    .get(rehearsalId);
  const kept = notebook.db
    .prepare<
      [number],
      { forecast: Buffer; plan: string; clampError_mV: number | null; reach: number | null; finer: 0 | 1 }
    >(
      `SELECT r.forecast, v.document AS plan, n.clamp_error_mV AS clampError_mV, n.reach,
         n.rehearsal_id IS NOT NULL AS finer
       FROM rehearsal r JOIN version v ON v.version_id = r.plan_version LEFT JOIN numerical n USING (rehearsal_id)
       WHERE r.rehearsal_id = ?`,
    )
    .get(rehearsalId);
  if (!row || !kept) return missingRecord('rehearsal', rehearsalId);
  const stored = decodeFrame(new Uint8Array(kept.forecast).buffer) as Forecast;
  const numerical: Forecast['numerical'] = kept.finer
    ? { state: 'computed', clampError_mV: kept.clampError_mV, reach: kept.reach }
    : stored.numerical;
  const plan = readBack(planSchema, kept.plan, `rehearsal ${rehearsalId}`);
  return { summary: summaryOf(row), forecast: { ...stored, numerical }, plan };
}

function summaryOf(row: SummaryRow): RehearsalSummary {
  const { planHash, cellHash, rigHash, protocolHash, ...rest } = row;
  return { ...rest, hashes: { plan: planHash, cell: cellHash, rig: rigHash, protocol: protocolHash } };
}

/** The plan must be there, and a session must be one of the plan's own cell. */
function mustFit(notebook: Notebook, done: FinishedRehearsal): void {
  const plan = notebook.db
    .prepare<[number], { cellId: number }>('SELECT cell_id AS cellId FROM plan WHERE plan_id = ?')
    .get(done.planId);
  if (!plan) return missingRecord('plan', done.planId);
  if (done.sessionId === null) return;
  const session = notebook.db
    .prepare<[number, number]>('SELECT 1 FROM session WHERE session_id = ? AND cell_id = ?')
    .get(done.sessionId, plan.cellId);
  if (session === undefined) missingRecord("session of the plan's cell", done.sessionId);
}
