import { setUpWithForeignIds } from './foreign-set-up.ts';

/** Ids of rows that the test makes in another shop; the same names stand in paths. */
export type ForeignIds = Record<
  | 'jobId'
  | 'stageId'
  | 'memberId'
  | 'runId'
  | 'sheetId'
  | 'placeId'
  | 'personId'
  | 'zoneId'
  | 'keyId'
  | 'traceId'
  | 'coatingId'
  | 'attachmentId'
  | 'lampId'
  | 'circuitId'
  | 'openingId'
  | 'closureId'
  | 'filterId'
  | 'entryId',
  string
>;

const someSheetBody = {
  summary: '',
  options: [],
  parts: [],
  stages: [
    {
      key: 'prep',
      kind: 'prep',
      title: 'Prepare',
      option: null,
      coatingId: null,
      ways: [
        {
          id: 'by-hand',
          label: 'By hand',
          placeKinds: ['prep'],
          stay: false,
          skill: 'prep',
          lampCount: 0,
          family: null,
          load: null,
          gap: { min: 0, max: null, settle: 0 },
          split: true,
          bakeCelsius: null,
          phases: [{ kind: 'work', minutes: 30, attendance: 'hands' }],
        },
      ],
    },
  ],
};

/**
 * For each route that takes an id beside the shop's: a request that is right but for the ids. The test sends it with another
 * shop's ids and with ids of nothing, and the answers must be the same to the byte.
 */
export const withForeignIds: Readonly<Record<string, (ids: ForeignIds) => { body?: object; query?: string }>> = {
  'change-member': () => ({ body: { disabled: true } }),
  invite: ({ personId }) => ({ body: { email: 'new@shop.test', role: 'painter', personId } }),
  'read-job': () => ({}),
  'create-job': ({ sheetId }) => ({
    body: {
      id: '0190a0a0-0000-7000-8000-000000000001',
      sheetId,
      options: [],
      parts: [{ name: 'Wing', substrate: 'steel', units: 1 }],
      title: 'Wing',
      vehicle: '',
      colourNote: '',
      notes: '',
      releaseAt: '2026-03-10T13:00:00Z',
      promiseAt: null,
      weight: 1,
      electric: false,
      heatLimitCelsius: null,
      heatLimitMinutes: null,
    },
  }),
  'read-sheet': () => ({}),
  'read-sheet-version': () => ({}),
  'save-sheet': () => ({ body: { version: 1, body: someSheetBody } }),
  'change-sheet': () => ({ body: { revision: 1, name: 'Mine now' } }),
  'export-sheet': () => ({}),
  'create-sheet': ({ sheetId }) => ({
    body: { id: '0190a0a0-0000-7000-8000-000000000002', name: 'Copy', copyOf: sheetId },
  }),
  'change-job': () => ({ body: { version: 1, title: 'Mine now' } }),
  'withdraw-job': () => ({ body: { version: 1 } }),
  'move-stage': ({ placeId }) => ({ body: { version: 1, start: '2026-03-11T13:00:00Z', placeId } }),
  'read-coating': () => ({}),
  'change-coating': () => ({ body: { version: 1, name: 'Mine now' } }),
  'upload-data-sheet': () => ({ body: {} }),
  'remove-data-sheet': () => ({}),
  'download-attachment': () => ({}),
  'touched-by-coating': () => ({}),
  'retime-with-coating': ({ sheetId, jobId }) => ({ body: { version: 1, sheetIds: [sheetId], jobIds: [jobId] } }),
  'read-plan-run': () => ({}),
  'stop-plan-run': () => ({ body: {} }),
  'read-bench': ({ personId }) => ({ query: `?personId=${personId}` }),
  'change-person': () => ({ body: { version: 1, name: 'Mine now' } }),
  'order-people': ({ personId }) => ({ body: { personIds: [personId] } }),
  'retire-person': () => ({ body: { version: 1, lastDay: null } }),
  'bring-back-person': () => ({ body: { version: 1 } }),
  'add-absence': () => ({ body: { from: '2026-03-11T13:00:00Z', to: null, reason: '' } }),
  'remove-absence': () => ({}),
  'start-stage': () => ({ body: { version: 1 } }),
  'finish-stage': () => ({ body: { version: 1 } }),
  'list-readings': () => ({ query: '?from=2026-03-10T00:00:00Z&to=2026-03-11T00:00:00Z' }),
  'add-reading': () => ({
    body: {
      id: '0190a0a0-0000-7000-8000-000000000002',
      at: '2026-03-10T12:00:00Z',
      celsius: 20,
      humidity: 50,
      surfaceCelsius: null,
    },
  }),
  'change-zone-air': () => ({ body: { version: 0, source: 'latest', schedule: [] } }),
  'revoke-api-key': () => ({ body: {} }),
  'list-traces': () => ({}),
  'read-trace': () => ({}),
  'remove-trace': () => ({ body: { removed: true } }),
  'attach-trace': () => ({
    body: {
      id: '0190a0a0-0000-7000-8000-000000000003',
      fileName: 'bake.csv',
      coatingId: null,
      points: [{ celsius: 60, minutes: 30 }],
      earlierMinutes: 0,
      limitCelsius: null,
      hottestCelsius: null,
      rows: 'AAAA',
    },
  }),
  ...setUpWithForeignIds,
};
