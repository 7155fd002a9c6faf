type Ids = Record<'placeId' | 'zoneId' | 'lampId' | 'circuitId', string>;

const somePlace = {
  kind: 'booth',
  name: 'Mine now',
  units: 4,
  bakes: false,
  bakeLimitCelsius: null,
  volumeM3: null,
  airFlowM3PerHour: null,
  clearanceMinutes: 0,
};
const someClosure = {
  kind: 'closure',
  label: '',
  placeId: null,
  lampId: null,
  startsLocal: '2026-03-11T07:00',
  rule: null,
  minutes: 60,
};
const someFilter = {
  name: 'Exhaust',
  changeAfterHours: 200,
  changeAfterDays: null,
  pascalLimit: null,
  efficiencyPercent: null,
};

/** The part of `withForeignIds` in foreign-ids.ts that is about places, lamps, hours and filters. */
export const setUpWithForeignIds: Readonly<Record<string, (ids: Ids) => { body?: object }>> = {
  'create-place': ({ zoneId }) => ({ body: { ...somePlace, zoneId } }),
  'change-place': () => ({ body: { version: 1, name: 'Mine now' } }),
  'retire-place': () => ({ body: { version: 1 } }),
  'bring-back-place': () => ({ body: { version: 1 } }),
  'order-places': ({ placeId }) => ({ body: { placeIds: [placeId] } }),
  'change-zone': () => ({ body: { version: 1, name: 'Mine now' } }),
  'remove-zone': () => ({ body: { version: 1 } }),
  'create-lamp': ({ circuitId }) => ({ body: { name: 'Mine now', circuitId, kilowatts: 3, wave: 'short' } }),
  'change-lamp': () => ({ body: { version: 1, name: 'Mine now' } }),
  'retire-lamp': () => ({ body: { version: 1 } }),
  'bring-back-lamp': () => ({ body: { version: 1 } }),
  'order-lamps': ({ lampId }) => ({ body: { lampIds: [lampId] } }),
  'change-circuit': () => ({ body: { version: 1, name: 'Mine now' } }),
  'remove-circuit': () => ({ body: { version: 1 } }),
  'remove-opening': () => ({}),
  'create-closure': ({ placeId }) => ({ body: { ...someClosure, placeId } }),
  'change-closure': () => ({ body: { ...someClosure, version: 1 } }),
  'remove-closure': () => ({ body: { version: 1 } }),
  'create-filter': ({ placeId }) => ({ body: { ...someFilter, placeId } }),
  'change-filter': () => ({ body: { version: 1, name: 'Mine now' } }),
  'add-filter-entry': () => ({
    body: {
      id: '0190a0a0-0000-7000-8000-000000000003',
      kind: 'change',
      at: '2026-03-10T12:00:00Z',
      pascals: null,
      note: '',
    },
  }),
  'remove-filter-entry': () => ({}),
};
