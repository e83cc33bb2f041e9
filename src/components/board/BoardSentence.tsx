import type { BoardCounts } from '../../view/board';
import { boardSearch, WHOLE_BOARD, type BoardQuery, type ShownState } from '../../view/board-query';
import { boardSentence, type SentencePiece } from '../../view/board-sentence';
import { CONDITION_INK } from '../../view/condition-words';
import { plainClick } from './plain-click';

interface BoardSentenceProps {
  counts: BoardCounts;
  query: BoardQuery;
  /** time of day at which the stream was last live, when it is lost: the sentence speaks of then and has no ink */
  lastLive: string | undefined;
  onChoose: (change: Partial<BoardQuery>) => void;
}

/** The state of the network in words. Its coloured words are links that show those lines alone, and all of them again. */
export function BoardSentence({ counts, query, lastLive, onChoose }: BoardSentenceProps) {
  const lost = lastLive !== undefined;
  return (
    <div aria-live="polite" aria-atomic="true">
      <h1
        className={`text-sentence font-medium text-pretty max-sm:text-[1.375rem] ${lost ? 'text-ink-2' : ''}`}
      >
        {boardSentence(counts, lastLive).map((piece, place) => (
          <Piece
            key={piece.state ?? `between ${place}`}
            piece={piece}
            query={query}
            lost={lost}
            onChoose={onChoose}
          />
        ))}
      </h1>
    </div>
  );
}

/** Weight and kind of the underline go with the colour: blind is dashed, what is merely not judged is thin. */
const ink = (state: ShownState): string => {
  if (state === 'over') return 'bg-over px-1 whitespace-nowrap text-on-over decoration-transparent';
  if (state === 'near' || state === 'rising') return `${CONDITION_INK[state]} decoration-[3px]`;
  return `text-ink-2 ${state === 'blind' ? 'decoration-[3px] decoration-dashed' : 'decoration-1'}`;
};

interface PieceProps extends Pick<BoardSentenceProps, 'query' | 'onChoose'> {
  piece: SentencePiece;
  lost: boolean;
}

function Piece({ piece, query, lost, onChoose }: PieceProps) {
  const { words, state } = piece;
  if (state === undefined) return words;
  const alone = query.condition === state;
  const next = alone ? WHOLE_BOARD : { ...WHOLE_BOARD, sort: query.sort, condition: state };
  return (
    <a
      href={`/${boardSearch(next)}`}
      aria-current={alone || undefined}
      onClick={plainClick(() => onChoose(next))}
      className={`underline underline-offset-[0.25em] hover:decoration-[5px] sm:whitespace-nowrap ${lost ? 'text-ink-2 decoration-1' : ink(state)}`}
    >
      {words}
    </a>
  );
}
