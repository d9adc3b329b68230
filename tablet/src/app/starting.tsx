import { Mark } from '#components/mark.tsx';

/** While the first page is fetched: the mark, still. */
export function Starting() {
  return (
    <div role="status" className="grid min-h-dvh place-content-center">
      <Mark className="size-16" />
      <span className="sr-only">Steepfall is starting.</span>
    </div>
  );
}
