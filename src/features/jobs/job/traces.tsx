import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { FlaskConical, X } from 'lucide-react';
import { Link } from 'react-router-dom';
import { listTraces, removeTrace, type BakeTrace } from '#contracts/traces.ts';
import { call } from '#src/lib/api.ts';
import { errorText } from '#src/lib/error-texts.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { may, useFormats, useShop } from '#src/lib/session.ts';
import { Badge } from '#src/ui/badge.tsx';
import { IconButton } from '#src/ui/icon-button.tsx';
import { showToast } from '#src/ui/toast-store.ts';

const tracesKey = (shopId: string, jobId: string) => shopKey(shopId, 'job', jobId, 'traces');

/** The bake traces of a stage: what each came to, and the way to the desk. */
export function Traces({ jobId, stageId }: { jobId: string; stageId: string }) {
  const shop = useShop();
  const { data } = useQuery({
    queryKey: tracesKey(shop.id, jobId),
    queryFn: ({ signal }) => call(listTraces, { params: { shopId: shop.id, jobId }, signal }),
  });
  const own = data?.traces.filter((trace) => trace.stageId === stageId) ?? [];
  if (own.length === 0) return null;
  return (
    <ul aria-label="Bake traces" className="flex flex-col gap-2">
      {own.map((trace) => (
        <TraceLine key={trace.id} trace={trace} jobId={jobId} />
      ))}
    </ul>
  );
}

function TraceLine({ trace, jobId }: { trace: BakeTrace; jobId: string }) {
  const shop = useShop();
  const { temperature, dateTime } = useFormats();
  const remove = useRemoval(jobId);
  const { verdict } = trace;
  const one = (minutes: number) => (Math.floor(minutes * 10) / 10).toFixed(1);
  return (
    <li className="flex flex-wrap items-center gap-x-3 gap-y-1 rounded border border-line px-3 py-2">
      <Curve trace={trace} />
      <span className="min-w-0 grow">
        <span className="flex flex-wrap items-center gap-2">
          <Badge tone={verdict.cured ? 'moss' : 'crimson'}>{verdict.cured ? 'cured' : 'not yet cured'}</Badge>
          {verdict.tooHot && <Badge tone="crimson">above the heat limit</Badge>}
          <span className="figures">
            {one(verdict.doneMinutes)} of {one(verdict.neededMinutes)} min at {temperature(verdict.referenceCelsius)},
            hottest {temperature(Math.max(verdict.peakCelsius, verdict.hottestCelsius ?? verdict.peakCelsius))}
          </span>
        </span>
        <span className="block text-xs break-words text-muted">
          {trace.fileName}, by {trace.coatingName ?? 'a typed sheet'} · {dateTime(trace.at)}
          {trace.by && ` by ${trace.by}`}
        </span>
      </span>
      <Link
        className="link inline-flex items-center gap-1 text-[0.8125rem]"
        to={`/cure?tab=trace&trace=${trace.id}${trace.coatingId === null ? '' : `&coating=${trace.coatingId}`}`}
      >
        <FlaskConical size={14} aria-hidden="true" /> Cure desk
      </Link>
      {may.workStages(shop.role) && (
        <IconButton
          label={`Take off ${trace.fileName}`}
          icon={<X size={16} />}
          disabled={remove.isPending}
          onClick={() => remove.mutate({ id: trace.id, removed: true })}
        />
      )}
    </li>
  );
}

/** Taking off can be undone. */
function useRemoval(jobId: string) {
  const shop = useShop();
  const client = useQueryClient();
  const set = ({ id, removed }: { id: string; removed: boolean }) =>
    call(removeTrace, { params: { shopId: shop.id, traceId: id }, body: { removed } });
  const again = () => client.invalidateQueries({ queryKey: tracesKey(shop.id, jobId) });
  const failed = (error: unknown) => showToast(`It stays as it was. ${errorText(error).what}`, { tone: 'bad' });
  return useMutation({
    mutationFn: set,
    onSuccess: (trace) =>
      showToast(`${trace.fileName} is taken off`, {
        act: { label: 'Undo', run: () => void set({ id: trace.id, removed: false }).then(again, failed) },
      }),
    onError: failed,
    onSettled: again,
  });
}

const size = { width: 96, height: 32 };

function Curve({ trace: { curve, verdict } }: { trace: BakeTrace }) {
  const end = curve.at(-1)?.[0] ?? 1;
  const start = curve[0]?.[0] ?? 0;
  const low = Math.min(...curve.map(([, celsius]) => celsius));
  const high = Math.max(...curve.map(([, celsius]) => celsius), low + 1);
  const points = curve.map(([minutes, celsius]) => {
    const x = ((minutes - start) / Math.max(1e-9, end - start)) * size.width;
    const y = size.height - 2 - ((celsius - low) / (high - low)) * (size.height - 4);
    return `${x.toFixed(1)},${y.toFixed(1)}`;
  });
  return (
    <svg
      {...size}
      role="img"
      aria-label={`Temperature over ${Math.round(verdict.lengthMinutes)} min`}
      className="shrink-0"
    >
      <polyline points={points.join(' ')} className="fill-none stroke-ember" strokeWidth={1.5} />
    </svg>
  );
}
