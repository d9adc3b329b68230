import { foldRun } from '@steepfall/shared/runs';
import { compileSheet, usualReachS, type RecipeDocument } from '@steepfall/shared/sheets';
import { wallClock } from '@steepfall/shared/timers';
import { formatBatchNumber } from '../batches/batch-number.js';
import { hashPassword } from '../common/passwords.js';
import { kettleSetupOf } from '../rehearsals/kettle-setup.js';
import { projectionOf } from '../runs/projection.js';
import { demoEquipment, demoHouse, demoId, demoMemberId, demoProbe, demoSignIns } from './demo-house.js';
import { demoRecipes, oolongRecipe, senchaRecipe, type DemoRecipe } from './demo-recipes.js';
import { storesTables } from './demo-stores.js';
import { recordDay } from './recorded-day.js';

export type Row = Record<string, string | number | boolean | null>;
/** Rows by table, parents before children. */
export type Tables = [table: string, rows: Row[]][];

const DAY_MS = 24 * 3_600_000;
const ROOM_C = 21;
const SEED = 7;
const newestSencha = senchaRecipe.revisions[1];

/** The calendar date at this place, `YYYY-MM-DD`. */
export function localDate(atMs: number): string {
  const date = new Date(atMs);
  const part = (value: number) => String(value).padStart(2, '0');
  return `${date.getFullYear()}-${part(date.getMonth() + 1)}-${part(date.getDate())}`;
}

function localTime(atMs: number, hour: number, minute: number): number {
  return new Date(atMs).setHours(hour, minute, 0, 0);
}

/** The whole demo house as of this instant: one finished batch five days ago, one planned for today. */
export async function demoTables(nowMs: number): Promise<Tables> {
  const houseId = demoHouse.id;
  const owned = { house_id: houseId };
  const brewedAtMs = localTime(nowMs - 5 * DAY_MS, 8, 14);
  const madeAtMs = localTime(nowMs - 9 * DAY_MS, 19, 30);
  const probeId = demoId('probe');
  const brewed = { id: demoId('batch/brewed'), revision: senchaRecipe.revisions[0] };
  const finished = finishedRun(brewed.id, batchNumberOf(brewedAtMs, 1), brewedAtMs, probeId);
  const endedAtMs = finished.run['ended_at_ms'] as number;
  const today = plannedBatch(demoId('batch/today'), nowMs, isSameYear(brewedAtMs, nowMs) ? 2 : 1);

  return [
    [
      'houses',
      [{ id: houseId, name: demoHouse.name, altitude_m: demoHouse.altitudeM, is_demo: true, created_at_ms: madeAtMs }],
    ],
    [
      'users',
      await Promise.all(
        demoSignIns.map(async ({ role, email, password }) => ({
          id: demoId(`user/${role}`),
          email,
          password_hash: await hashPassword(password),
          created_at_ms: madeAtMs,
        })),
      ),
    ],
    [
      'memberships',
      demoSignIns.map(({ role, displayName }) => ({
        ...owned,
        id: demoMemberId(role),
        user_id: demoId(`user/${role}`),
        display_name: displayName,
        role,
        created_at_ms: madeAtMs,
      })),
    ],
    [
      'equipment',
      Object.entries(demoEquipment).map(([key, { kind, name, facts }]) => ({
        ...owned,
        id: demoId(`equipment/${key}`),
        kind,
        name,
        facts: JSON.stringify(facts),
        created_at_ms: madeAtMs,
      })),
    ],
    [
      'probes',
      [
        {
          ...owned,
          id: probeId,
          name: demoProbe.name,
          lag_s: demoProbe.lagS,
          resolution_c: demoProbe.resolutionC,
          sample_period_s: demoProbe.samplePeriodS,
          created_at_ms: madeAtMs,
        },
      ],
    ],
    [
      'recipes',
      demoRecipes.map(({ id, name, summary }, index) => ({
        ...owned,
        id,
        name,
        summary,
        // The first is the one that a rehearsal practises.
        created_at_ms: madeAtMs + index,
      })),
    ],
    [
      'recipe_revisions',
      [
        ...revisionRows(senchaRecipe, [madeAtMs, endedAtMs + 600_000]),
        ...revisionRows(
          oolongRecipe,
          [7, 6, 2].map((daysAgo) => localTime(nowMs - daysAgo * DAY_MS, 20, 40)),
        ),
      ],
    ],
    [
      'batches',
      [
        {
          ...plannedBatch(brewed.id, brewedAtMs, 1),
          revision_id: brewed.revision.id,
          created_at_ms: madeAtMs + 600_000,
        },
        today,
      ],
    ],
    ...storesTables({
      nowMs,
      madeAtMs,
      brewed: {
        id: brewed.id,
        batchNumber: batchNumberOf(brewedAtMs, 1),
        document: brewed.revision.document,
        startedAtMs: brewedAtMs,
      },
      localDate,
    }),
    ['lot_reservations', setAside(demoId('batch/today'), newestSencha.document, nowMs)],
    ['runs', [finished.run]],
    ['run_events', finished.events],
    ['readings', finished.readings],
  ];
}

/** What a planned batch holds of the shelf: additions have the key of their lot. */
function setAside(batchId: string, { additions }: RecipeDocument, atMs: number): Row[] {
  return additions.map(({ id, massG }) => ({
    house_id: demoHouse.id,
    id: demoId(`reservation/${id}`),
    batch_id: batchId,
    lot_id: demoId(`lot/${id}`),
    addition_id: id,
    mass_g: massG,
    created_at_ms: atMs,
  }));
}

function revisionRows({ id: recipeId, revisions }: DemoRecipe, savedAtMs: readonly number[]): Row[] {
  return revisions.map(({ id, note, document }, index) => ({
    house_id: demoHouse.id,
    id,
    recipe_id: recipeId,
    number: index + 1,
    note,
    created_at_ms: savedAtMs[index] as number,
    created_by: demoMemberId('brewer'),
    volume_l: document.volumeL,
    document: JSON.stringify(document),
  }));
}

function isSameYear(aMs: number, bMs: number): boolean {
  return localDate(aMs).slice(0, 4) === localDate(bMs).slice(0, 4);
}

function batchNumberOf(atMs: number, numberInYear: number): string {
  return formatBatchNumber({ year: Number(localDate(atMs).slice(0, 4)), numberInYear });
}

/** A batch of the newest revision, planned for the day of this instant. */
export function plannedBatch(id: string, atMs: number, numberInYear: number): Row {
  return {
    id,
    house_id: demoHouse.id,
    year: Number(localDate(atMs).slice(0, 4)),
    number_in_year: numberInYear,
    batch_number: batchNumberOf(atMs, numberInYear),
    revision_id: newestSencha.id,
    planned_on: localDate(atMs),
    kettle_id: demoId('equipment/kettle'),
    chiller_id: demoId('equipment/coil'),
    keg_id: demoId('equipment/kegA'),
    probe_id: demoId('probe'),
    volume_l: newestSencha.document.volumeL,
    created_at_ms: atMs,
    created_by: demoMemberId('brewer'),
  };
}

function finishedRun(
  batchId: string,
  batchNumber: string,
  startedAtMs: number,
  probeId: string,
): { run: Row; events: Row[]; readings: Row[] } {
  const { altitudeM } = demoHouse;
  const revision = senchaRecipe.revisions[0];
  const { document } = revision;
  const coolantC = demoEquipment.coil.facts.coolantC;
  const runId = demoId('run');
  const memberId = demoMemberId('brewer');
  const title = `${senchaRecipe.name} ${document.volumeL} L`;
  const clock = wallClock(startedAtMs);
  let serial = 0;
  const newId = () => {
    serial += 1;
    return demoId(`run/event/${serial}`);
  };
  const sheet = compileSheet(document, { altitudeM, reachS: usualReachS });
  const day = recordDay({
    started: {
      id: newId(),
      runId,
      type: 'run.started',
      v: 1,
      atMs: startedAtMs,
      by: memberId,
      station: 'hub',
      payload: {
        ...{ title, batchId, batchNumber, revisionId: revision.id, isRehearsal: false, sheet, clock, document },
        kit: { altitudeM, kettle: demoEquipment.kettle.facts, chiller: demoEquipment.coil.facts },
      },
    },
    kettle: kettleSetupOf({
      kettle: demoEquipment.kettle,
      chiller: demoEquipment.coil,
      document,
      altitudeM,
      seed: SEED,
    }),
    driver: {
      watch: {
        lagS: demoProbe.lagS,
        resolutionC: demoProbe.resolutionC,
        samplePeriodS: demoProbe.samplePeriodS,
        roomC: ROOM_C,
        coolantC,
      },
      hasProbe: true,
    },
    memberId,
    station: 'tablet',
    newId,
  });

  const projection = projectionOf(foldRun(day.events));
  const run: Row = {
    id: runId,
    house_id: demoHouse.id,
    batch_id: batchId,
    batch_number: batchNumber,
    revision_id: revision.id,
    title,
    is_rehearsal: false,
    seed: null,
    probe_id: probeId,
    probe_lag_s: demoProbe.lagS,
    probe_resolution_c: demoProbe.resolutionC,
    probe_sample_period_s: demoProbe.samplePeriodS,
    room_c: ROOM_C,
    coolant_c: coolantC,
    status: projection.status,
    outcome: projection.outcome,
    started_at_ms: startedAtMs,
    ended_at_ms: projection.endedAtMs,
    started_by: memberId,
    clock_anchor_wall_ms: projection.clockAnchorWallMs,
    clock_anchor_run_ms: projection.clockAnchorRunMs,
    clock_rate: projection.clockRate,
    last_seq: projection.lastSeq,
    current_step_title: projection.currentStepTitle,
    alert_stage: projection.alertStage,
    probe_out_at_ms: projection.probeOutAtMs,
    created_at_ms: startedAtMs,
  };
  const events = day.events.map(({ seq, id, type, v, atMs, by, station, sentBy, receivedAtMs, payload }) => ({
    run_id: runId,
    seq,
    id,
    type,
    v,
    at_ms: atMs,
    by,
    station,
    sent_by: sentBy,
    received_at_ms: receivedAtMs,
    payload: JSON.stringify(payload),
  }));
  const readings = day.readings.map(({ atMs, tempC }) => ({
    probe_id: probeId,
    at_ms: atMs,
    temp_c: tempC,
    received_at_ms: atMs,
  }));
  return { run, events, readings };
}
