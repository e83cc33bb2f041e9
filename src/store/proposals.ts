import { desc, eq, type SQL } from 'drizzle-orm';
import type { Proposal } from '../contract/replay';
import { insertAuditEntry } from './audit';
import type { Store } from './client';
import { settingProposal } from './schema/proposals';
import { line } from './schema/register';

const PROPOSALS_MOST = 200;

export type NewProposal = Pick<Proposal, 'recorded' | 'summary' | 'note'> & { readonly lineId: number };

/** Keeps a proposal and says so in the audit trail; hands it back as it stands. */
export async function insertProposal(
  store: Store,
  { lineId, recorded, summary, note }: NewProposal,
  { by, nowMs }: { by: { readonly id: string; readonly name: string }; nowMs: number },
): Promise<Proposal> {
  const keptAt = new Date(nowMs);
  const [added] = await store.db
    .insert(settingProposal)
    .values({ lineId, recorded, summary, note, keptBy: by.name, keptAt })
    .$returningId();
  const proposal = added && (await readProposal(store, added.id));
  if (proposal === undefined) throw new Error('The proposal that was just kept is not there.');
  await insertAuditEntry(store, {
    at: keptAt,
    person: by,
    action: 'proposal kept',
    subject: proposal.line,
    detail: { proposal: proposal.id, note },
  });
  return proposal;
}

export async function readProposal(store: Store, id: number): Promise<Proposal | undefined> {
  return (await readWhere(store, eq(settingProposal.id, id)))[0];
}

/** The proposals of a line, or of all, newest first. */
export const readProposals = (store: Store, lineKey?: string): Promise<Proposal[]> =>
  readWhere(store, lineKey === undefined ? undefined : eq(line.key, lineKey));

async function readWhere(store: Store, condition: SQL | undefined): Promise<Proposal[]> {
  const rows = await store.db
    .select({ proposal: settingProposal, key: line.key, name: line.name })
    .from(settingProposal)
    .innerJoin(line, eq(settingProposal.lineId, line.id))
    .where(condition)
    .orderBy(desc(settingProposal.keptAt), desc(settingProposal.id))
    .limit(PROPOSALS_MOST);
  return rows.map(({ proposal: { lineId: _lineId, keptAt, ...rest }, key, name }) => ({
    ...rest,
    line: key,
    lineName: name,
    keptAt: keptAt.toISOString(),
  }));
}
