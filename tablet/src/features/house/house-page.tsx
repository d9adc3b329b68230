import { Page } from '#components/page.tsx';
import { useKnown, useMay } from '#lib/session.ts';
import { EquipmentSection } from './equipment-section.tsx';
import { HouseFacts } from './house-facts.tsx';
import { MembersSection } from './members-section.tsx';
import { ProbesSection } from './probes-section.tsx';

export function HousePage() {
  const { house } = useKnown();
  const may = useMay();
  return (
    <Page
      title={house.name}
      tabTitle="House"
      above="House"
      lead="Who works here, what stands here, and what measures here."
    >
      {may('members:read') ? <MembersSection /> : null}
      <EquipmentSection />
      {may('probes:read') ? <ProbesSection /> : null}
      <HouseFacts />
    </Page>
  );
}
