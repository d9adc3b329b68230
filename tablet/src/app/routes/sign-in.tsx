import { SignInPage } from '#features/auth/sign-in-page.tsx';

export function SignInRoute() {
  return <SignInPage />;
}
