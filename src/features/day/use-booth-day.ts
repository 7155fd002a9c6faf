import { useCallback, useMemo } from 'react';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { useDay } from './data/use-day.ts';
import { useMoves } from './data/use-moves.ts';
import { usePlanRun } from './data/use-plan-run.ts';
import type { Drawn } from './model/board.ts';
import { daysShown, rangeOf, step } from './model/day-range.ts';
import { useAxis, useBoardItems, useBoardWords, useSay } from './use-board.ts';
import { useDayLink } from './use-day-link.ts';

/** Everything the booth day's page shows, as the address asks for it, and the moves that change it. */
export function useBoothDay() {
  const shop = useShop();
  const formats = useFormats();
  const say = useSay(formats);
  const today = formats.today();
  const [link, setLink] = useDayLink(today);
  const canPlan = may.plan(shop.role);
  const zone = shop.timeZone;
  const plan = link.plan ?? (canPlan ? 'draft' : 'posted');
  const days = useMemo(() => daysShown(link.date, link.span), [link.date, link.span]);
  const asked = useMemo(() => ({ shopId: shop.id, ...rangeOf(days, zone), plan }), [shop.id, days, zone, plan]);
  const neighbours = useMemo(
    () => ([1, -1] as const).map((way) => rangeOf(daysShown(step(link.date, link.span, way), link.span), zone)),
    [link.date, link.span, zone],
  );
  const day = useDay(asked, neighbours);
  const view = day.data;
  // Whole seconds: the way of each answer through the network is not worth a new picture.
  const skew = view ? Math.round((Date.parse(view.serverTime) - day.dataUpdatedAt) / 1000) * 1000 : 0;
  // Who looks at the posted plan while a draft is open sees it, and does not change the other one unseen.
  const movable = canPlan && view !== undefined && (view.shown === 'draft' || view.draft === null);
  const moves = useMoves(asked, view);
  const planning = usePlanRun(shop.id, view);
  const axis = useAxis(view, days, link.span, link.allHours, zone);
  const board = useBoardItems(view, axis, link.people);
  const open = useCallback((item: Drawn) => setLink({ stage: item.members[0].id }), [setLink]);
  const words = useBoardWords(view, say, open);
  const hands = useHands(moves.move, movable);
  return {
    ...{ shop, formats, say, today, link, setLink, canPlan, days, day, view, skew, movable, moves, planning },
    ...{ axis, board, open, words, ...hands },
  };
}

/** Dropping and nudging bars: both are moves. */
function useHands(move: ReturnType<typeof useMoves>['move'], movable: boolean) {
  const onDrop = useCallback(
    (item: Drawn, start: number, placeId: string) =>
      void move({ stageId: item.members[0].id, start: new Date(start).toISOString(), placeId }),
    [move],
  );
  const onNudge = useCallback(
    (item: Drawn, minutes: number) => {
      const [bar] = item.members;
      if (!movable || bar.state !== 'planned') return;
      const start = new Date(Date.parse(bar.from) + minutes * 60_000).toISOString();
      void move({ stageId: bar.id, start, placeId: bar.placeId });
    },
    [move, movable],
  );
  return { onDrop, onNudge };
}
