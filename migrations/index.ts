import type { Knex } from 'knex';
import * as ground from './202612010900_ground.ts';
import * as accounts from './202612010910_accounts.ts';
import * as shops from './202612010920_shops.ts';
import * as placesAndLamps from './202612010930_places_and_lamps.ts';
import * as people from './202612010940_people.ts';
import * as coatingsAndSheets from './202612010950_coatings_and_sheets.ts';
import * as jobs from './202612011000_jobs.ts';
import * as plans from './202612011010_plans.ts';
import * as queueAndLetters from './202612011020_queue_and_letters.ts';
import * as changes from './202612011030_changes.ts';
import * as changeIds from './202612011040_change_ids.ts';
import * as attachments from './202612011500_attachments.ts';
import * as coatingOfStage from './202612011502_coating_of_stage.ts';
import * as sheetNotes from './202612011510_sheet_notes.ts';
import * as airReadings from './202612011520_air_readings.ts';
import * as airSettings from './202612011522_air_settings.ts';
import * as apiKeys from './202612011524_api_keys.ts';
import * as airOfPlans from './202612011526_air_of_plans.ts';
import * as bakeTraces from './202612011528_bake_traces.ts';
import * as setUpVersions from './202612011540_set_up_versions.ts';
import * as filters from './202612011542_filters.ts';
import * as peopleChange from './202612011550_people_change.ts';
import * as demoReset from './202612011552_demo_reset.ts';
import * as signUp from './202612011554_sign_up.ts';

type Step = { up(knex: Knex): Promise<void>; down(knex: Knex): Promise<void> };

/** In order. Names carry no file ending, so that a database made from source and one made from a bundle agree. */
export const migrations: Record<string, Step> = {
  '202612010900_ground': ground,
  '202612010910_accounts': accounts,
  '202612010920_shops': shops,
  '202612010930_places_and_lamps': placesAndLamps,
  '202612010940_people': people,
  '202612010950_coatings_and_sheets': coatingsAndSheets,
  '202612011000_jobs': jobs,
  '202612011010_plans': plans,
  '202612011020_queue_and_letters': queueAndLetters,
  '202612011030_changes': changes,
  '202612011040_change_ids': changeIds,
  '202612011500_attachments': attachments,
  '202612011502_coating_of_stage': coatingOfStage,
  '202612011510_sheet_notes': sheetNotes,
  '202612011520_air_readings': airReadings,
  '202612011522_air_settings': airSettings,
  '202612011524_api_keys': apiKeys,
  '202612011526_air_of_plans': airOfPlans,
  '202612011528_bake_traces': bakeTraces,
  '202612011540_set_up_versions': setUpVersions,
  '202612011542_filters': filters,
  '202612011550_people_change': peopleChange,
  '202612011552_demo_reset': demoReset,
  '202612011554_sign_up': signUp,
};
