import { HomePage } from '#features/home/home-page.tsx';

export function HomeRoute() {
  return <HomePage />;
}
