import { dayText } from '../../view/line-comparison';
import { markDay, type TrendMark } from '../../view/trend-marks';

interface Props {
  /** the line's key */
  readonly line: string;
  readonly marks: readonly TrendMark[];
  readonly timeZone: string;
}

/** What is marked on the trend, newest first, each with the way to its before and after. */
export function MarkTable({ line, marks, timeZone }: Props) {
  const newestFirst = [...marks].sort((one, other) => other.atMs - one.atMs);
  return (
    <table className="figures mb-3 max-w-[70rem]">
      <caption className="pb-1 text-left font-medium">Known changes marked above</caption>
      <thead className="sr-only">
        <tr>
          <th scope="col">day</th>
          <th scope="col">what</th>
          <th scope="col">before and after</th>
        </tr>
      </thead>
      <tbody>
        {newestFirst.map((mark) => {
          const day = markDay(mark, timeZone);
          return (
            <tr key={`${mark.kind} ${mark.atMs} ${mark.told}`}>
              <td className="whitespace-nowrap">{dayText(day)}</td>
              <td className="w-full wrap-anywhere">{mark.told}</td>
              <td className="figure">
                <a
                  className="link"
                  href={`/lines/${line}/compare?at=${day}`}
                  aria-label={`Compare before and after ${dayText(day)}`}
                >
                  Compare
                </a>
              </td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}
