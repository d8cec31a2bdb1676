import { Button } from '#components/ui/index.ts';
import { formatNumber } from '#contract/format.ts';

interface PagerProps {
  /** What is counted: "studies". */
  what: string;
  page: number;
  pageSize: number;
  total: number;
  onPage: (page: number) => void;
}

/** Where one is in a long list, and a step either way; nothing where one page holds all. */
export function Pager({ what, page, pageSize, total, onPage }: PagerProps) {
  const pages = Math.ceil(total / pageSize);
  if (pages <= 1 && page === 1) return null;
  const first = (page - 1) * pageSize + 1;
  const last = Math.min(page * pageSize, total);
  return (
    <nav className="mt-4 flex items-center gap-3" aria-label={`Pages of ${what}`}>
      <Button
        size="small"
        icon="previous"
        notYet={page <= 1 ? 'This is the first page.' : undefined}
        onClick={() => onPage(page - 1)}
      >
        Previous page
      </Button>
      <span className="text-sm text-ink-2">
        {total >= first
          ? `${formatNumber(first)}–${formatNumber(last)} of ${formatNumber(total)} ${what}`
          : `No ${what} on this page`}
      </span>
      <Button
        size="small"
        icon="next"
        notYet={page >= pages ? 'This is the last page.' : undefined}
        onClick={() => onPage(page + 1)}
      >
        Next page
      </Button>
    </nav>
  );
}
