import { HousePage } from '#features/house/house-page.tsx';

export function HouseRoute() {
  return <HousePage />;
}
