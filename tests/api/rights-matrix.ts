/**
 * Who may do what, as data. A new route needs a row here.
 *
 * `may`: the door opens (the test then sends nonsense and expects to be told so, 400). A number: the door stays shut with
 * that status. To another shop's owner and to who was put out a shop looks as if it did not exist: 404.
 */
export type Cell = 'may' | 401 | 403 | 404;
export const who = [
  'anonymous',
  'painter',
  'office',
  'lead',
  'owner',
  'otherOwner',
  'disabledMember',
  'disabledAccount',
] as const;
export type Who = (typeof who)[number];
export type Row = Record<Who, Cell>;

const inShop = (painter: Cell, office: Cell, lead: Cell, owner: Cell): Row => ({
  anonymous: 401,
  painter,
  office,
  lead,
  owner,
  otherOwner: 404,
  disabledMember: 404,
  disabledAccount: 401,
});
const everyone = inShop('may', 'may', 'may', 'may');
const planners = inShop(403, 403, 'may', 'may');
const sheetKeepers = planners;
const jobKeepers = inShop(403, 'may', 'may', 'may');
const stageWorkers = inShop('may', 403, 'may', 'may');
const owners = inShop(403, 403, 403, 'may');

const all = (cell: Cell): Row => Object.fromEntries(who.map((one) => [one, cell])) as Row;
const anybody = all('may');
const signedIn: Row = { ...anybody, anonymous: 401, disabledAccount: 401 };

/** The door of loggers: a key of its own opens it, and no session is worth anything there. */
const keyHolders = all(401);

export const rights: Readonly<Record<string, Row>> = {
  'read-health': anybody,
  'read-ready': anybody,
  'sign-in': anybody,
  'sign-out': anybody,
  'read-session': signedIn,
  'change-account': signedIn,
  'change-password': signedIn,
  'ask-for-reset': anybody,
  'reset-password': anybody,
  'read-invitation': anybody,
  'accept-invitation': anybody,
  'read-sign-up': anybody,
  'ask-to-sign-up': anybody,
  'read-sign-up-link': anybody,
  'sign-up': anybody,
  'list-mailbox': anybody,
  'read-mailbox-letter': anybody,

  'list-members': owners,
  invite: owners,
  'change-member': owners,
  'list-letters': owners,
  live: everyone,

  'list-jobs': everyone,
  'read-job': everyone,
  'create-job': jobKeepers,
  'change-job': jobKeepers,
  'withdraw-job': jobKeepers,
  'list-sheets': everyone,
  'survey-sheets': everyone,
  'read-sheet-ground': everyone,
  'read-sheet': everyone,
  'read-sheet-version': everyone,
  'create-sheet': sheetKeepers,
  'save-sheet': sheetKeepers,
  'change-sheet': sheetKeepers,
  'export-sheet': everyone,
  'import-sheet': sheetKeepers,
  'export-sheets': everyone,
  'list-coatings': everyone,
  'survey-coatings': everyone,
  'read-coating': everyone,
  'create-coating': sheetKeepers,
  'change-coating': sheetKeepers,
  'export-coatings': everyone,
  'import-coatings': sheetKeepers,
  'upload-data-sheet': sheetKeepers,
  'remove-data-sheet': sheetKeepers,
  'download-attachment': everyone,
  'touched-by-coating': everyone,
  'retime-with-coating': sheetKeepers,

  'read-day': everyone,
  'open-draft': planners,
  'drop-draft': planners,
  'move-stage': planners,
  'compare-draft': planners,
  'post-draft': planners,
  'start-plan-run': planners,
  'read-plan-run': everyone,
  'stop-plan-run': planners,

  'read-bench': stageWorkers,
  'start-stage': stageWorkers,
  'finish-stage': stageWorkers,
  'read-use': planners,

  'read-air': everyone,
  'list-readings': everyone,
  'export-readings': everyone,
  'add-reading': stageWorkers,
  'import-readings': planners,
  'change-air-settings': planners,
  'change-zone-air': planners,
  'send-readings': keyHolders,
  'list-api-keys': owners,
  'create-api-key': owners,
  'revoke-api-key': owners,
  'list-traces': everyone,
  'read-trace': everyone,
  'attach-trace': stageWorkers,
  'remove-trace': stageWorkers,

  'create-shop': signedIn,
  'reset-demo': owners,
  'read-first-steps': owners,
  'take-hours': owners,
  'take-places': owners,
  'take-people': owners,
  'take-sheets': owners,
  'take-job': owners,

  'list-people': planners,
  'create-person': owners,
  'change-person': owners,
  'order-people': owners,
  'retire-person': owners,
  'bring-back-person': owners,
  'add-absence': planners,
  'remove-absence': planners,
  'export-people': planners,
  'import-people': owners,
  'export-absences': planners,
  'import-absences': planners,

  'list-places': everyone,
  'create-place': owners,
  'change-place': owners,
  'retire-place': owners,
  'bring-back-place': owners,
  'order-places': owners,
  'create-zone': owners,
  'change-zone': owners,
  'remove-zone': owners,
  'export-places': everyone,
  'import-places': owners,
  'list-lamps': everyone,
  'create-lamp': owners,
  'change-lamp': owners,
  'retire-lamp': owners,
  'bring-back-lamp': owners,
  'order-lamps': owners,
  'create-circuit': owners,
  'change-circuit': owners,
  'remove-circuit': owners,
  'export-lamps': everyone,
  'import-lamps': owners,
  'read-hours': everyone,
  'set-week': owners,
  'add-opening': owners,
  'remove-opening': owners,
  'create-closure': planners,
  'change-closure': planners,
  'remove-closure': planners,
  'export-closures': everyone,
  'import-closures': planners,
  'list-filters': everyone,
  'create-filter': owners,
  'change-filter': owners,
  'add-filter-entry': stageWorkers,
  'remove-filter-entry': planners,
  'read-shop': planners,
  'change-shop': owners,
  'send-test-letter': owners,
};
