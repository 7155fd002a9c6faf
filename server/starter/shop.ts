/** How a new shop weighs a plan and cleans between kinds of work until it says otherwise. Common practice. */
export const starterShop = {
  lampMoveMinutes: 5,
  freezeMinutes: 60,
  cleanups: [
    { from: 'primer', to: 'colour', minutes: 15 },
    { from: 'colour', to: 'primer', minutes: 10 },
  ],
  objective: { tardiness: 1, flow: 0.01, makespan: 0, booth: 0.02, moves: 5, unplaced: 100_000 },
};

/** Stands on each data sheet of the starter set. */
export const starterCaution =
  'Common practice to begin with: check every figure against the maker’s data sheet and your local code.';

/** Units of room: a door is one, a vehicle side four. */
export const starterUnits = { booth: 6, prep: 6, rack: 20 };
