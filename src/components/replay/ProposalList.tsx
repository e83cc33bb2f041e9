import type { Proposal } from '../../contract/replay';
import { momentText, resultSentence } from '../../view/replay-words';
import type { SiteCustom } from '../../view/site-custom';

interface Props {
  /** newest first */
  readonly proposals: readonly Proposal[];
  readonly site: SiteCustom;
}

/** The proposals kept for a line; each opens its sheet. */
export function ProposalList({ proposals, site }: Props) {
  return (
    <section className="panel p-4 sm:p-[1.125rem]" aria-labelledby="proposals-title">
      <h2 id="proposals-title" className="m-0 text-body font-semibold">
        Proposals kept for this line
      </h2>
      {proposals.length === 0 ? (
        <p className="mt-1 text-ink-2">None yet. An engineer can keep what a replay tried.</p>
      ) : (
        <ul className="m-0 mt-1 list-none p-0">
          {proposals.map((proposal) => (
            <li key={proposal.id} className="border-b border-hairline py-2 last:border-b-0">
              <a href={`/proposals/${proposal.id}`} className="link">
                Proposal {proposal.id}
              </a>{' '}
              <span className="text-ink-2">
                {momentText(proposal.keptAt, site.timeZone).slice(0, -3)}, {proposal.keptBy}
              </span>
              <p className="m-0">{proposal.note}</p>
              <p className="m-0 text-caption text-ink-2">
                {resultSentence(proposal.summary, site.phaseLetters)}
              </p>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
