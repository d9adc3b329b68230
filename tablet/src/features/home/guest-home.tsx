import { ButtonLink } from '#components/button.tsx';
import { useKnown, useMay } from '#lib/session.ts';

/** For a taster or a pourer: what they can do here, and nothing that would give a blind tasting away. */
export function GuestHome() {
  const { member, house } = useKnown();
  const may = useMay();
  if (may('batches:read')) {
    return (
      <div className="grid max-w-prose justify-items-start gap-6">
        <p className="text-lead">
          You pour for {house.name}. The book tells you what went into each keg and when it was made: find it by the
          batch number on the tag.
        </p>
        <ButtonLink look="primary" size="sheet" to="/batches">
          Open the book
        </ButtonLink>
      </div>
    );
  }
  return (
    <div className="grid max-w-prose gap-6">
      <p className="text-lead">
        Hello, {member.displayName}. You taste for {house.name}, and you taste blind: recipes, batches and runs are not
        shown to you, so that the glass is all you judge.
      </p>
      <p className="text-lead text-soft">There is nothing to do here until the brewer calls you to a glass.</p>
    </div>
  );
}
