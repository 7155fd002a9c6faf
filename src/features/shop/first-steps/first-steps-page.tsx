import { useQuery } from '@tanstack/react-query';
import { Check } from 'lucide-react';
import type { ReactNode } from 'react';
import { Link, useNavigate, useSearchParams } from 'react-router-dom';
import { firstStep, type FirstStep, type FirstSteps } from '#contracts/first-steps.ts';
import { paths } from '#src/app/paths.ts';
import { cx } from '#src/lib/cx.ts';
import { may, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { Progress } from '#src/ui/progress.tsx';
import { SkeletonLines } from '#src/ui/skeleton.tsx';
import { firstStepsQuery } from './first-steps-query.ts';
import { HoursStep } from './hours-step.tsx';
import { JobStep } from './job-step.tsx';
import { PeopleStep } from './people-step.tsx';
import { PlacesStep } from './places-step.tsx';
import { ResetDemo } from './reset-demo.tsx';
import { SheetsStep } from './sheets-step.tsx';

export function Component() {
  const { role } = useShop();
  if (may.setUp(role)) return <FirstStepsPage />;
  return (
    <Page title="First steps" width="text">
      <p>Owners set up the shop. What is yours is in the list beside this.</p>
    </Page>
  );
}

function FirstStepsPage() {
  const shop = useShop();
  const steps = useQuery({
    ...firstStepsQuery(shop.id),
    // A notice comes when it is done, but not where the worker gave up.
    refetchInterval: ({ state }) => (state.data?.resetting ? 2_000 : false),
  });
  const data = steps.data;
  const done = data?.steps.filter((one) => one.done).length ?? 0;
  const isReady = data !== undefined && done === data.steps.length;
  return (
    <Page
      title="First steps"
      about={data ? `${done} of ${data.steps.length} done` : shop.name}
      width="text"
      actions={
        <Button asChild>
          <Link to={paths.newShop()}>Open another shop</Link>
        </Button>
      }
    >
      {steps.isPending && <SkeletonLines lines={8} label="Loading the first steps" />}
      {steps.isError && (
        <ErrorNote error={steps.error} what="The steps could not be loaded." retry={() => void steps.refetch()} />
      )}
      {data && (
        <>
          <Progress label="First steps done" value={done / data.steps.length} />
          <p>
            {isReady
              ? 'The shop is set up. Each part has a page of its own with everything there is to it.'
              : 'Five steps to a first plan. Everything is filled in as many shops have it; take it, or put in what you know. You can leave at any time and go on later.'}
          </p>
          <Steps data={data} />
          {data.isDemo && <ResetDemo resetting={data.resetting} />}
        </>
      )}
    </Page>
  );
}

const titles: Record<FirstStep, string> = {
  hours: 'Hours and time zone',
  places: 'Booths, stations, lamps',
  people: 'People',
  sheets: 'Coatings and process sheets',
  job: 'First job, first plan',
};

function sayDone(step: FirstStep, { has }: FirstSteps): string {
  const count = (n: number, one: string, many = `${one}s`) => `${n} ${n === 1 ? one : many}`;
  switch (step) {
    case 'hours':
      return 'opening hours are set';
    case 'places':
      return [count(has.booths, 'booth'), count(has.stations, 'station'), count(has.lamps, 'lamp')].join(', ');
    case 'people':
      return count(has.people, 'person', 'people');
    case 'sheets':
      return `${count(has.sheets, 'process sheet')}, ${count(has.coatings, 'data sheet')}`;
    case 'job':
      return count(has.jobs, 'job');
    default:
      return step satisfies never;
  }
}

const editor: Record<FirstStep, string> = {
  hours: paths.hours(),
  places: paths.places(),
  people: paths.people(),
  sheets: paths.sheets(),
  job: paths.day(),
};

/** The first that is not done is open, or the one the address names; done ones lead to their pages. */
function Steps({ data }: { data: FirstSteps }) {
  const [params, setParams] = useSearchParams();
  const navigate = useNavigate();
  const asked = firstStep.safeParse(params.get('step'));
  const isOpenStep = (step: FirstStep) => data.steps.some((one) => one.step === step && !one.done);
  const first = data.steps.find((one) => !one.done)?.step ?? null;
  const current = asked.success && isOpenStep(asked.data) ? asked.data : first;
  const next = () => setParams({}, { replace: true });
  const forms: Record<FirstStep, ReactNode> = {
    hours: <HoursStep onTaken={next} />,
    places: <PlacesStep onTaken={next} />,
    people: <PeopleStep onTaken={next} />,
    sheets: <SheetsStep starter={data.starter} onTaken={next} />,
    job: <JobStep onTaken={() => void navigate(paths.day())} />,
  };
  return (
    <ol className="flex flex-col gap-3">
      {data.steps.map(({ step, done }, at) => (
        <li key={step} className="card" aria-current={step === current ? 'step' : undefined}>
          <div className="flex min-h-12 items-center gap-3 px-4 py-2">
            <StepMark number={at + 1} done={done} current={step === current} />
            <h2 className="min-w-0 grow text-base">
              {titles[step]}
              {done && <span className="sr-only">, done</span>}
            </h2>
            {done && (
              <Link to={editor[step]} className="link text-right text-[0.8125rem]">
                {sayDone(step, data)}
              </Link>
            )}
            {!done && step !== current && (
              <Button size="small" look="quiet" onClick={() => setParams({ step }, { replace: true })}>
                Open<span className="sr-only">: {titles[step]}</span>
              </Button>
            )}
          </div>
          {step === current && <div className="border-t border-line px-4 py-4">{forms[step]}</div>}
        </li>
      ))}
    </ol>
  );
}

const StepMark = ({ number, done, current }: { number: number; done: boolean; current: boolean }) => (
  <span
    aria-hidden="true"
    className={cx(
      'figures flex size-7 shrink-0 items-center justify-center rounded-full border text-[0.8125rem] font-bold',
      done ? 'border-moss bg-moss-soft text-moss' : current ? 'border-ember text-ember' : 'border-line text-muted',
    )}
  >
    {done ? <Check size={16} /> : number}
  </span>
);
