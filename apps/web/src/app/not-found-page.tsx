import { ActionLink } from '../shared/ui/action';
import { PageHeading } from '../shared/ui/page-heading';
import { Sheet } from '../shared/ui/sheet';
import { urls } from './urls';

export function NotFoundPage() {
  return (
    <>
      <PageHeading title="Nothing here" />
      <Sheet>
        <p>There is no page at this address. If a link brought you here, what it meant may belong to another plant.</p>
        <ActionLink to={urls.desk()}>Go to the desk</ActionLink>
      </Sheet>
    </>
  );
}
