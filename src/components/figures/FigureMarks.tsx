import { knownWords, type Known } from './known.ts';

/**
 * What is known of a figure, drawn small: a span with ends where it is uncertain, a ruled corner where it has a
 * source, a page where it has evidence. In words for whoever cannot see it.
 */
export function FigureMarks({ known }: { known: Known }) {
  const { particulars, files } = known;
  const words = knownWords(known);
  if (words === '') return null;
  const uncertain = particulars.low !== undefined || particulars.high !== undefined;
  return (
    <span className="fig-marks" title={words}>
      {uncertain && (
        <svg width="12" height="10" aria-hidden="true">
          <path d="M1 2v6M11 2v6M1 5h10" />
        </svg>
      )}
      {particulars.source !== undefined && (
        <svg width="9" height="10" aria-hidden="true">
          <path d="M1.5 1v8h6M4 3.5h3.5M4 6h3.5" />
        </svg>
      )}
      {files > 0 && (
        <svg width="9" height="10" aria-hidden="true">
          <path d="M1.5 1h4l2 2v6h-6zM5.5 1v2h2" />
        </svg>
      )}
      <span className="sr-only">, {words}</span>
    </span>
  );
}
