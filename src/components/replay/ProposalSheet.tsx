import type { Proposal } from '../../contract/replay';
import { settingsRow } from '../../view/replay-settings-row';
import { sidesDrawn } from '../../view/replay-sides';
import {
  coverageSentences,
  markSentence,
  momentText,
  periodText,
  resultSentence,
} from '../../view/replay-words';
import type { SiteCustom } from '../../view/site-custom';
import { zoneText } from '../../view/figures';
import { CharacteristicPicture } from './CharacteristicPicture';
import { SidesTable } from './SidesTable';

interface Props {
  readonly proposal: Proposal;
  readonly site: SiteCustom;
}

/** A proposal as one sheet: on the screen, and on paper. */
export function ProposalSheet({ proposal, site }: Props) {
  const { summary, recorded, note, keptBy, keptAt } = proposal;
  const { phaseLetters: letters, timeZone } = site;
  const mark = markSentence(summary);
  const drawn = sidesDrawn(summary, recorded === null ? [] : [recorded], recorded ?? undefined);
  return (
    <article className="panel proposal-sheet grid max-w-[60rem] gap-3 p-4 sm:p-6">
      <p className="m-0 border-y-2 border-ink py-2 text-sentence leading-tight font-semibold">
        Proposal copy. No device is set from here.
      </p>
      <header>
        <h1 className="m-0 text-lead font-semibold">
          Proposal {proposal.id}, {proposal.lineName}
        </h1>
        <p className="m-0 text-ink-2">
          Kept by {keptBy} on {momentText(keptAt, timeZone).slice(0, -3)} {zoneText(keptAt, timeZone)}
        </p>
        <p className="mt-1.5 mb-0 max-w-[80ch] whitespace-pre-line">{note}</p>
      </header>
      <section>
        <p className="m-0 max-w-[70ch] text-lead font-medium">{resultSentence(summary, letters)}</p>
        {mark && <p className="m-0 font-semibold">{mark}</p>}
        <p className="mt-1 mb-0 text-caption text-ink-2">
          Replayed over {periodText(summary, timeZone)}. {coverageSentences(summary).join(' ')}
        </p>
      </section>
      <div className="grid items-start gap-x-6 gap-y-3 sm:grid-cols-[minmax(0,1fr)_minmax(0,1.3fr)] print:grid-cols-[minmax(0,1fr)_minmax(0,1.3fr)]">
        <SettingsCompared proposal={proposal} />
        <CharacteristicPicture {...drawn} />
      </div>
      <SidesTable summary={summary} letters={letters} timeZone={timeZone} />
    </article>
  );
}

function SettingsCompared({ proposal: { summary, recorded } }: { proposal: Proposal }) {
  const proposed = settingsRow(summary.settings);
  const was = recorded === null ? undefined : settingsRow(recorded);
  const names = [...new Set([...proposed.keys(), ...(was?.keys() ?? [])])];
  return (
    <table className="figures">
      <thead>
        <tr>
          <th scope="col">setting</th>
          <th scope="col">proposed</th>
          <th scope="col">recorded then</th>
        </tr>
      </thead>
      <tbody>
        {names.map((name) => {
          const differs = proposed.get(name) !== was?.get(name);
          return (
            <tr key={name}>
              <th scope="row">{name}</th>
              <td className={differs ? 'font-semibold' : ''}>{proposed.get(name) ?? '–'}</td>
              <td className="text-ink-2">{was?.get(name) ?? '–'}</td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}
