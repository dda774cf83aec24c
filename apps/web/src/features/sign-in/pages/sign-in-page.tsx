import { PageHeading } from '../../../shared/ui/page-heading';

export function SignInPage() {
  return <PageHeading title="Sign in" />;
}
