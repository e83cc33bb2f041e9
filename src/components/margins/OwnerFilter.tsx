import { ownerChoices } from '../../view/owner-names';
import { Select } from '../shell/Select';

interface OwnerFilterProps {
  owners: readonly string[];
  chosen: string | undefined;
  onChoose: (owner: string | undefined) => void;
}

/** Not there while no owner is recorded. */
export function OwnerFilter({ owners, chosen, onChoose }: OwnerFilterProps) {
  const offered = ownerChoices(owners, chosen);
  if (offered.length === 0) return null;
  return (
    <Select
      label="Owner"
      name="owner"
      value={chosen ?? ''}
      options={[['', 'all'], ...offered.map((owner) => [owner, owner] as const)]}
      onChoose={(value) => onChoose(value || undefined)}
    />
  );
}
