import { changeJob, createJob, listJobs, readJob, withdrawJob } from '#contracts/jobs.ts';
import type { Deps } from '../deps.ts';
import { may } from '../policies.ts';
import * as change from '../services/change-job.ts';
import * as create from '../services/create-job.ts';
import * as list from '../services/list-jobs.ts';
import * as read from '../services/read-job.ts';
import * as withdraw from '../services/withdraw-job.ts';
import type { Routes } from './route.ts';

export function jobRoutes(routes: Routes, deps: Deps): void {
  routes.shop(listJobs, may.seeShop, ({ actor, query }) => list.listJobs(deps, actor, query));
  routes.shop(readJob, may.seeShop, ({ actor, params }) => read.readJob(deps, actor, params.jobId));
  routes.shop(createJob, may.keepJobs, ({ actor, body }) => create.createJob(deps, actor, body));
  routes.shop(changeJob, may.keepJobs, ({ actor, params, body }) => change.changeJob(deps, actor, params.jobId, body));
  routes.shop(withdrawJob, may.keepJobs, ({ actor, params, body }) =>
    withdraw.withdrawJob(deps, actor, params.jobId, body.version),
  );
}
