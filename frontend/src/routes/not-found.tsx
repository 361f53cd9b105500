import { Link } from 'react-router-dom';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';

/** For an address that leads nowhere. */
export function NotFoundPage() {
  return (
    <div className="max-w-letter px-4 pt-8 wide:px-page">
      <PageTitle>Not found</PageTitle>
      <PageHeading>Nothing is here</PageHeading>
      <p className="mt-3">The address is wrong, or what stood here has been taken away.</p>
      <p className="mt-3">
        <Link to="/">Go to the calendar</Link>
      </p>
    </div>
  );
}
