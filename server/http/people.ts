import * as contract from '#contracts/people.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import { exportAbsences, importAbsences } from '../services/absences-csv.ts';
import { addAbsence, removeAbsence } from '../services/change-absences.ts';
import { changePerson } from '../services/change-person.ts';
import { createPerson } from '../services/create-person.ts';
import { listPeople } from '../services/list-people.ts';
import { orderPeople } from '../services/order-people.ts';
import { exportPeople, importPeople } from '../services/people-csv.ts';
import { bringBackPerson, retirePerson } from '../services/retire-person.ts';
import type { Routes } from './route.ts';

/** The roster. Who plans sees it and says who is away; owners keep it. */
export function peopleRoutes(routes: Routes, deps: Deps): void {
  routes.shop(contract.listPeople, may.plan, ({ actor }) => listPeople(deps, actor));
  routes.shop(contract.createPerson, may.setUp, ({ actor, body }) => createPerson(deps, actor, body));
  routes.shop(contract.changePerson, may.setUp, ({ actor, params, body }) =>
    changePerson(deps, actor, params.personId, body),
  );
  routes.shop(contract.orderPeople, may.setUp, async ({ actor, body }) => {
    await orderPeople(deps, actor, body.personIds);
    return {};
  });
  routes.shop(contract.retirePerson, may.setUp, ({ actor, params, body }) =>
    retirePerson(deps, actor, params.personId, body),
  );
  routes.shop(contract.bringBackPerson, may.setUp, ({ actor, params, body }) =>
    bringBackPerson(deps, actor, params.personId, body.version),
  );
  routes.shop(contract.addAbsence, may.plan, ({ actor, params, body }) =>
    addAbsence(deps, actor, params.personId, body),
  );
  routes.shop(contract.removeAbsence, may.plan, ({ actor, params }) =>
    removeAbsence(deps, actor, params.personId, params.absenceId),
  );
  routes.shop(contract.exportPeople, may.plan, ({ actor }) => exportPeople(deps, actor));
  routes.shop(contract.importPeople, may.setUp, ({ actor, body }) => importPeople(deps, actor, body));
  routes.shop(contract.exportAbsences, may.plan, ({ actor }) => exportAbsences(deps, actor));
  routes.shop(contract.importAbsences, may.plan, ({ actor, body }) => importAbsences(deps, actor, body));
}
