import { Button } from '#components/ui/Button.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import type { ChangeLine } from '#contract/what-if-words.ts';

interface ChangeListProps {
  lines: readonly ChangeLine[];
  /** Takes one change back; undefined where it is not this person's to do. */
  onTakeBack?: ((line: ChangeLine) => void) | undefined;
}

/** Every change that is tried: what the study has, what is tried, and what falls away with it. */
export function ChangeList({ lines, onTakeBack }: ChangeListProps) {
  if (lines.length === 0)
    return <p className="caption">Nothing is tried yet: the what-if is the study’s ranking.</p>;
  return (
    <TableScroll label="Changes tried">
      <table className="wi-changes table" data-dense="">
        <thead>
          <tr>
            <th scope="col">Change</th>
            <th scope="col">In the study</th>
            <th scope="col">Tried</th>
            {onTakeBack && (
              <th scope="col">
                <span className="sr-only">Take back</span>
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          {lines.map((line) => (
            <tr key={keyOf(line)}>
              <th scope="row">
                {line.what}
                {line.falls && <span className="sub">{line.falls}</span>}
              </th>
              {line.each.length > 0 ? (
                <td colSpan={2}>
                  <ul className="wi-each">
                    {line.each.map((one) => (
                      <li key={one}>{one}</li>
                    ))}
                  </ul>
                </td>
              ) : (
                <>
                  <td>{line.from}</td>
                  <td>{line.to}</td>
                </>
              )}
              {onTakeBack && (
                <td className="wi-take-back">
                  <Button
                    size="small"
                    kind="text"
                    aria-label={`Take back ${line.what}`}
                    onClick={() => onTakeBack(line)}
                  >
                    Take back
                  </Button>
                </td>
              )}
            </tr>
          ))}
        </tbody>
      </table>
    </TableScroll>
  );
}

export const keyOf = ({ at }: ChangeLine): string => Object.values(at).join(' ');
