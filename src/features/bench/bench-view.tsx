import type { BenchView as View } from '#contracts/bench.ts';
import { useFormats } from '#src/lib/session.ts';
import { Caution } from '#src/ui/caution.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { useServerNow } from './data/use-server-now.ts';
import { useTaps } from './data/use-taps.ts';
import { benchList, tapped } from './model/bench-list.ts';
import { DoneList, LaterList } from './other-stages.tsx';
import { NextStage } from './next-stage.tsx';
import { RefusedTap } from './refused-tap.tsx';
import { RunningStage } from './running-stage.tsx';

/** `arrivedAt`: the browser's clock when the answer came; with the server's time in it, that gives the difference. */
export function BenchView({ data, arrivedAt }: { data: View; arrivedAt: number }) {
  const now = useServerNow(Date.parse(data.serverTime) - arrivedAt);
  const { taps, refused, isStuck, tap, overrule, forgive } = useTaps();
  const { dayOf } = useFormats();
  const isToday = dayOf(now) === data.day;
  const list = benchList(taps.reduce((stages, each) => tapped(stages, each.stageId, each.deed, each.at), data.stages));
  const waitFor = (id: string) =>
    taps.some(({ stageId }) => stageId === id) ? (isStuck ? ('stuck' as const) : ('sending' as const)) : null;
  const onTap = isToday ? tap : null;
  return (
    <div className="flex flex-col gap-5">
      {refused && <RefusedTap refused={refused} onOverrule={(reason) => overrule(refused, reason)} onSeen={forgive} />}
      {isStuck && (
        <p role="status" className="rounded border border-amber bg-amber-soft px-4 py-3 text-base font-semibold">
          No answer from the server. {taps.length > 1 ? `Your ${taps.length} taps are` : 'Your tap is'} kept and sent by
          itself.
        </p>
      )}
      {data.stages.length === 0 && <NothingBooked view={data} isToday={isToday} />}
      <div className="grid items-start gap-5 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <div className="flex min-w-0 flex-col gap-5">
          {list.done.length > 0 && !list.next && list.now.length === 0 && <AllDone isToday={isToday} />}
          {list.now.map((stage) => (
            <RunningStage key={stage.id} stage={stage} now={now} waiting={waitFor(stage.id)} onTap={onTap} />
          ))}
          {list.next && (
            <NextStage
              stage={list.next}
              now={now}
              waiting={waitFor(list.next.id)}
              onTap={onTap}
              isOnly={list.now.length === 0}
            />
          )}
        </div>
        <div className="flex min-w-0 flex-col gap-5">
          <LaterList stages={list.later} now={now} waitFor={waitFor} onTap={onTap} />
          <DoneList stages={list.done} waitFor={waitFor} />
        </div>
      </div>
      <Caution quiet>
        Times are least times from the shop&rsquo;s process sheets. The maker&rsquo;s data sheet and what you see on the
        part come first. Supplied air while spraying; nobody enters during purge or bake.
      </Caution>
    </div>
  );
}

const AllDone = ({ isToday }: { isToday: boolean }) => (
  <div className="card">
    <EmptyState title={isToday ? 'All done for today' : 'All of this day was done'}>
      If something new is posted for this bench, it appears here by itself.
    </EmptyState>
  </div>
);

function NothingBooked({ view, isToday }: { view: View; isToday: boolean }) {
  if (view.person === null)
    return (
      <EmptyState title="You are not on the roster">
        A bench belongs to somebody who works in the shop. Leads can choose a person above.
      </EmptyState>
    );
  return (
    <EmptyState title={isToday ? 'Nothing booked for you today' : 'Nothing booked on this day'}>
      What the posted plan gives {view.person.name} stands here, with its times and its clock.
    </EmptyState>
  );
}
