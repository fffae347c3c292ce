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
      <div className="terrain">
        <Terrain />
        <p className="terrain-words">Contour lines of a response, and a set-point. Made up.</p>
      </div>
      <div className="sign-in-side">
        <div className="sign-in-form">
          <Wordmark height={40} />
          <div>
            <h1>Sign in</h1>
            <p className="text-ink-2">From sample to settings for electric-pulse fragmentation.</p>
          </div>
          <SignInForm
            onSignedIn={() => void navigate(safeBack(search.get('back')), { replace: true })}
          />
          <p className="text-2 text-ink-3">
            No account, or the password forgotten? The lab’s administrator sends a new one-time
            address.
          </p>
        </div>
        <footer className="text-1 text-ink-3">
          Cragline plans and records; it controls no rig. The maker’s manual and the lab’s rules
          come first.
        </footer>
      </div>
    </main>
  );
}
