import { useNavigate, useSearchParams } from 'react-router-dom';
import { SignInForm } from '@/features/accounts/SignInForm';
import { Terrain } from '@/features/accounts/Terrain';
import { Wordmark } from '@/components/Wordmark';

/** Only an address of this application: never one that leads away. */
const safeBack = (back: string | null) =>
  back !== null && /^\/(?!\/)/.test(back) && !back.includes('\\') ? back : '/';

export function SignInPage() {
  const navigate = useNavigate();
  const [search] = useSearchParams();
  return (
    <main className="sign-in">
      <div className="grid content-center gap-8 p-8">
        <Wordmark height={40} />
        <div className="grid gap-2">
          <h1 className="text-6">Sign in</h1>
          <p className="reading">
            From sample to settings for electric-pulse fragmentation: plan the runs, record the
            bench, fit the models, sign what works.
          </p>
        </div>
        <SignInForm
          onSignedIn={() => void navigate(safeBack(search.get('back')), { replace: true })}
        />
        <p className="text-2 text-ink-3">
          Accounts are made by the lab’s administrator. Cragline controls no rig.
        </p>
      </div>
      <div className="terrain">
        <Terrain />
      </div>
    </main>
  );
}
