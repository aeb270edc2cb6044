import { useNavigate, useSearchParams } from 'react-router-dom';
import { Door } from '#features/session/components/door.tsx';
import { SignInForm } from '#features/session/components/sign-in-form.tsx';
import { paths } from '#config/paths.ts';
import { useTitle } from '#lib/use-title.ts';

/** Only a path of this application is followed after signing in, never another site's address. */
const safePath = (from: string | null) => (from && /^\/(?![/\\])/.test(from) ? from : paths.surveys());

export function Component() {
  const navigate = useNavigate();
  const [search] = useSearchParams();
  useTitle('Sign in');
  return (
    <Door title="Sign in" lede="Screening HI detections for galaxies with gas and no stars.">
      <SignInForm onSignedIn={() => void navigate(safePath(search.get('from')), { replace: true })} />
    </Door>
  );
}
