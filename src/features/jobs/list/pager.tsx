import { ChevronLeft, ChevronRight } from 'lucide-react';
import { IconButton } from '#src/ui/icon-button.tsx';
import { pagesOf } from '../model/list-link.ts';

type PagerProps = { page: number; size: number; total: number; shown: number; onPage: (page: number) => void };

export function Pager({ page, size, total, shown, onPage }: PagerProps) {
  const pages = pagesOf(total, size);
  const first = (page - 1) * size + 1;
  return (
    <nav aria-label="Pages" className="flex flex-wrap items-center justify-between gap-2 text-muted">
      <p className="figures" role="status">
        {shown === 0 ? `None of ${total}` : `${first} to ${first + shown - 1} of ${total}`}
      </p>
      {pages > 1 && (
        <div className="flex items-center gap-1">
          <IconButton
            bordered
            label="Previous page"
            icon={<ChevronLeft size={18} />}
            disabled={page <= 1}
            onClick={() => onPage(page - 1)}
          />
          <span className="figures px-2">
            Page {page} of {pages}
          </span>
          <IconButton
            bordered
            label="Next page"
            icon={<ChevronRight size={18} />}
            disabled={page >= pages}
            onClick={() => onPage(page + 1)}
          />
        </div>
      )}
    </nav>
  );
}
