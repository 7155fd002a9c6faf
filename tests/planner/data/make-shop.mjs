#!/usr/bin/env node
// Makes a planning problem for an invented shop: same arguments, same problem.
//   make-shop.mjs [--jobs 12] [--days 5] [--booths 2] [--prep 4] [--lamps 3] [--people 6] [--seed 1] [--tight 1.0]
// --tight below 1 promises dates earlier than is comfortable.
import { fileURLToPath } from 'node:url';

export function makeShop({ jobs = 12, days = 5, booths = 2, prep = 4, lamps = 3, people = 6, seed = 1, tight = 1, loads = true } = {}) {
  let state = seed >>> 0 || 1;
  const random = () => { state = (state + 0x6d2b79f5) >>> 0; let t = state; t = Math.imul(t ^ (t >>> 15), t | 1); t ^= t + Math.imul(t ^ (t >>> 7), t | 61); return ((t ^ (t >>> 14)) >>> 0) / 4294967296; };
  const int = (a, b) => a + Math.floor(random() * (b - a + 1));
  const pick = (list) => list[int(0, list.length - 1)];
  const round5 = (x) => Math.max(5, Math.round(x / 5) * 5);

  const DAY = 1440, total = days + Math.ceil(days / 5) * 2 + 7; // weekends, and room to finish
  const workdays = []; for (let d = 0; d < total; d++) if (d % 7 < 5) workdays.push(d);
  const open = workdays.map((d) => [d * DAY + 420, d * DAY + 1080]);
  const shift = (from, to, lunch) => workdays.flatMap((d) => [[d * DAY + from, d * DAY + lunch], [d * DAY + lunch + 30, d * DAY + to]]);

  const P = {
    version: 1, origin: '2026-03-02T00:00:00Z', now: 0, horizon: total * DAY, open, purge: 3, lampMove: 5,
    cleanups: [{ from: 'primer', to: 'colour', minutes: 15 }, { from: 'colour', to: 'primer', minutes: 10 }],
    places: [], lamps: [], circuits: [], people: [], jobs: [], fixed: [], baseline: [],
    objective: { tardiness: 1, flow: 0.01, makespan: 0, booth: 0.02, moves: 0, unplaced: 100000 },
  };
  for (let b = 1; b <= booths; b++) P.places.push({ id: `booth-${b}`, kind: 'booth', zone: `booth-${b}`, units: b % 2 ? 4 : 6, closed: workdays.filter((d) => d % 7 === (b % 5)).map((d) => [d * DAY + 420, d * DAY + 450]) });
  for (let p = 1; p <= prep; p++) P.places.push({ id: `prep-${p}`, kind: 'prep', zone: `bay-${Math.ceil(p / 2)}`, units: 6, closed: [] });
  P.places.push({ id: 'rack', kind: 'rack', zone: null, units: 12, closed: [] });
  for (let c = 1; c <= Math.ceil(lamps / 3); c++) P.circuits.push({ id: `circuit-${c}`, kw: 13 });
  for (let l = 1; l <= lamps; l++) P.lamps.push({ id: `lamp-${l}`, kw: l % 2 ? 6 : 4.5, circuit: `circuit-${Math.ceil(l / 3)}`, closed: [] });
  for (let w = 1; w <= people; w++) P.people.push({ id: `person-${w}`, working: w % 3 === 0 ? shift(600, 1080, 810) : shift(450, 990, 720) });
  const painters = P.people.filter((_, i) => i % 2 === 0).map((p) => p.id), everyone = P.people.map((p) => p.id);
  const BOOTHS = P.places.filter((p) => p.kind === 'booth').map((p) => p.id), PREP = P.places.filter((p) => p.kind === 'prep').map((p) => p.id), LAMPS = P.lamps.map((l) => l.id);

  const ph = (kind, minutes, attendance, extra = {}) => ({ kind, minutes, attendance, ...extra });
  const coats = (n, spray, flash) => Array.from({ length: n }, (_, i) => [ph('spray', spray, 'hands'), ...(i < n - 1 ? [ph('flash', flash, 'hands')] : [])]).flat();
  const handwork = (id, kind, minutes, gap) => ({ id, kind, modes: [{ id: 'by-hand', places: PREP, stay: false, people: everyone, lamps: [], lampCount: 0, units: 1, family: null, load: null, gap, split: true, phases: [ph('work', minutes, 'hands')] }] });
  const base = { stay: false, lamps: [], lampCount: 0, family: null, load: null, split: false, people: [] };

  for (let j = 1; j <= jobs; j++) {
    const id = `job-${j}`, stages = [], type = pick(['plastic', 'plastic', 'panel', 'panel', 'side', 'small']);
    const units = { plastic: 2, panel: 2, side: 4, small: 1 }[type], big = type === 'side' ? 1.8 : type === 'small' ? 0.5 : 1;
    const none = { min: 0, max: null, settle: 0 };
    const lampCount = type === 'side' && lamps > 1 ? 2 : 1;
    const s = (kind) => `${id}.${stages.length + 1}-${kind}`;
    const cure = (kind, bakeMinutes, airMinutes, boothToo, dustFree) => ({ id: s(kind), kind, modes: [
      ...(boothToo ? [{ ...base, id: 'booth-bake', places: [], stay: true, units, family: 'colour', load: loads ? 'bake' : null, gap: { min: 10, max: 60, settle: 10 }, phases: [ph('purge', 5, 'none'), ph('bake', 40, 'onsite'), ph('cool', 15, 'none')] }] : []),
      { ...base, id: 'lamp', places: PREP, units, lamps: LAMPS, lampCount, gap: { min: dustFree, max: 720, settle: dustFree }, phases: [ph('bake', bakeMinutes, 'onsite', { lamp: true }), ph('cool', 15, 'none')] },
      { ...base, id: 'air', places: units <= 2 ? ['rack', ...PREP] : PREP, units, gap: { min: dustFree, max: 720, settle: dustFree }, phases: [ph('flash', airMinutes, 'none')] },
    ] });
    if (type !== 'small' || random() < 0.5) stages.push(handwork(s('prep'), 'prep', round5(int(40, 110) * big), none));
    if (type === 'plastic' || type === 'side' || random() < 0.3) {
      stages.push({ id: s('prime'), kind: 'prime', modes: [{ ...base, id: 'spray', places: units <= 4 && random() < 0.8 ? [...PREP, ...BOOTHS] : BOOTHS, people: painters, units, family: 'primer', gap: { min: 0, max: 480, settle: 0 }, phases: [ph('setup', 10, 'hands'), ...coats(int(2, 3), round5(7 * big), 10)] }] });
      stages.push(cure('primer-cure', 25, 180, false, 10));
      stages.push(handwork(s('block'), 'block', round5(int(30, 70) * big), none));
    }
    stages.push({ id: s('base'), kind: 'base', modes: [{ ...base, id: 'spray', places: BOOTHS, people: painters, units, family: 'colour', load: loads && units <= 2 ? 'colour' : null, gap: { min: 10, max: type === 'panel' ? 960 : null, settle: 0 }, phases: [ph('setup', 15, 'hands'), ...coats(3, round5(6 * big), 10)] }] });
    stages.push({ id: s('clear'), kind: 'clear', modes: [{ ...base, id: 'spray', places: [], stay: true, people: painters, units, family: 'colour', load: loads && units <= 2 ? 'colour' : null, gap: { min: 15, max: 240, settle: 15 }, phases: coats(2, round5(7 * big), 10) }] });
    stages.push(cure('clear-cure', 20, 720, true, 35));
    stages.push(handwork(s('finish'), 'finish', round5(int(30, 75) * big), { min: 30, max: null, settle: 0 }));
    const release = pick(workdays.filter((d) => d < days)) * DAY + pick([480, 480, 600, 780]);
    const hands = stages.reduce((sum, st) => sum + st.modes[0].phases.reduce((x, p) => x + p.minutes, 0), 0);
    const promised = workdays.findIndex((d) => d * DAY >= Math.floor(release / DAY) * DAY) + Math.max(stages.some((x) => x.kind === 'prime') ? 1 : 0, Math.round((hands / 330 + random()) * tight));
    P.jobs.push({ id, release, due: workdays[Math.min(promised, workdays.length - 1)] * DAY + 990, weight: pick([1, 1, 1, 2, 3]), stages });
  }
  return P;
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const options = {};
  for (let i = 2; i < process.argv.length; i += 2) options[process.argv[i].replace(/^--/, '')] = Number(process.argv[i + 1]);
  if (Object.values(options).some(Number.isNaN)) { console.error('make-shop: every option takes a number'); process.exit(2); }
  process.stdout.write(JSON.stringify(makeShop(options)) + '\n');
}
