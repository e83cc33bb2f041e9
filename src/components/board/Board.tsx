import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { useState } from 'react';
import type { LineList } from '../../contract/lines';
import { boardChoices, boardCounts, boardParts } from '../../view/board';
import { instantText } from '../../view/figures';
import { WHOLE_BOARD } from '../../view/board-query';
import type { SiteCustom } from '../../view/site-custom';
import { OpenWarnings } from '../warnings/OpenWarnings';
import { AttentionRow } from './AttentionRow';
import { BoardFilters } from './BoardFilters';
import { BoardSentence } from './BoardSentence';
import { EmptyBoard } from './EmptyBoard';
import { plainClick } from './plain-click';
import { QuietLines } from './QuietLines';
import { SettledLines } from './SettledLines';
import { useBoardLines } from './use-board-lines';
import { useBoardQuery } from './use-board-query';

export interface BoardProps {
  /** what the server knew when it made the page */
  list: LineList;
  site: SiteCustom;
  /** the address's query as the server read it */
  search: string;
  mayAcknowledge: boolean;
  mayEditRegister: boolean;
}

/** All lines, worst first. */
export function Board(props: BoardProps) {
  const [client] = useState(() => new QueryClient());
  return (
    <QueryClientProvider client={client}>
      <BoardView {...props} />
    </QueryClientProvider>
  );
}

function BoardView({ list, site, search, mayAcknowledge, mayEditRegister }: BoardProps) {
  const address = useBoardQuery(search);
  const { lines, nowMs, asOfMs, lost, refused, take } = useBoardLines(list);
  if (lines.length === 0) return <EmptyBoard mayEditRegister={mayEditRegister} />;
  const parts = boardParts(lines, address.query);
  const nothing = parts.attention.length + parts.quiet.length + parts.settled.length === 0;
  const shared = { site, nowMs, lost };
  return (
    <>
      <BoardSentence
        counts={boardCounts(lines)}
        query={address.query}
        lastLive={lost ? instantText(asOfMs, nowMs, site.timeZone) : undefined}
        onChoose={address.choose}
      />
      <BoardFilters address={address} choices={boardChoices(lines.map(({ line }) => line))} />
      {refused !== null && <Refusal words={refused.message} signedOut={refused.status === 401} />}
      {nothing && (
        <p className="mt-8">
          No line fits these filters.{' '}
          <a href="/" className="link" onClick={plainClick(() => address.choose(WHOLE_BOARD))}>
            Show all lines
          </a>
        </p>
      )}
      {parts.attention.length > 0 && (
        <section aria-label="Lines that need attention" className="mt-5">
          <ul className="grid gap-2">
            {parts.attention.map((one) => (
              <AttentionRow
                key={one.line.key}
                one={one}
                {...shared}
                asOfMs={asOfMs}
                mayAcknowledge={mayAcknowledge}
                onAcknowledged={take}
              />
            ))}
          </ul>
        </section>
      )}
      <OpenWarnings lines={lines} {...shared} mayAcknowledge={mayAcknowledge} onAcknowledged={take} />
      {parts.quiet.length > 0 && <QuietLines lines={parts.quiet} site={site} nowMs={nowMs} />}
      {parts.settled.length > 0 && (
        <SettledLines lines={parts.settled} group={address.query.group} {...shared} />
      )}
    </>
  );
}

function Refusal({ words, signedOut }: { words: string; signedOut: boolean }) {
  return (
    <p role="alert" className="mt-4 border-l-2 border-over pl-3">
      {signedOut ? (
        <>
          {words}{' '}
          <a href="/sign-in" className="link">
            To the sign-in page
          </a>
        </>
      ) : (
        <>The list could not be brought up to date: {words} It is asked for again within a minute.</>
      )}
    </p>
  );
}
