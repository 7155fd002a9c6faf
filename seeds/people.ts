/** First names that are nobody's. `trained`: whole months since the last spray training; it is good for five years. */
type PersonSeed = { name: string; shift: 'early' | 'late'; skills: string[]; trained: number | null };

export const people: PersonSeed[] = [
  { name: 'Orlin', shift: 'early', skills: ['paint', 'prep', 'polish'], trained: 14 },
  { name: 'Tavi', shift: 'early', skills: ['paint', 'prep'], trained: 30 },
  { name: 'Brisa', shift: 'late', skills: ['paint', 'prep'], trained: 8 },
  // Lapses in about two months.
  { name: 'Kelmo', shift: 'late', skills: ['paint', 'prep', 'polish'], trained: 58 },
  { name: 'Nerio', shift: 'early', skills: ['prep'], trained: null },
  { name: 'Sanva', shift: 'early', skills: ['prep', 'polish'], trained: null },
  { name: 'Dorvik', shift: 'late', skills: ['prep', 'polish'], trained: null },
  { name: 'Yulen', shift: 'late', skills: ['prep'], trained: null },
  { name: 'Pemrik', shift: 'early', skills: ['polish'], trained: null },
];

/** Breaks in minutes after the start of the shift. */
export const shifts = {
  early: {
    at: '07:00',
    minutes: 510,
    breaks: [
      { after: 150, minutes: 15 },
      { after: 285, minutes: 30 },
    ],
  },
  late: {
    at: '09:30',
    minutes: 510,
    breaks: [
      { after: 195, minutes: 30 },
      { after: 360, minutes: 15 },
    ],
  },
};
