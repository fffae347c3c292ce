import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { LinkButton } from '@/components/Button';
import { EmptyState, ErrorState, LoadingState } from '@/components/states';
import { Wordmark } from '@/components/Wordmark';
import { ChoosePasswordForm } from '@/features/accounts/ChoosePasswordForm';
import { invitationQuery } from '@/queries/session';

export function InvitationPage() {
  const [token] = useState(() => window.location.hash.slice(1));
  const navigate = useNavigate();
  const { data, error, isPending } = useQuery({
    ...invitationQuery(token),
    enabled: token !== '',
  });
  return (
    <main className="grid content-center gap-8 p-8 max-w-form min-h-screen">
      <Wordmark height={40} />
      {token === '' && (
        <EmptyState
          title="This address is not complete"
          action={<LinkButton to="/sign-in">To the sign-in</LinkButton>}
        >
          The one-time address has a long code behind the # sign. Copy it whole, or ask the
          administrator for a new one.
        </EmptyState>
      )}
      {token !== '' && isPending && <LoadingState what="Reading the invitation." lines={3} />}
      {error && <ErrorState error={error} />}
      {data && (
        <>
          <div className="grid gap-2">
            <h1 className="text-6">Welcome, {data.name}</h1>
            <p className="reading">
              {data.labName} has an account for you under {data.email}. Choose a password; you are
              signed in at once.
            </p>
          </div>
          <ChoosePasswordForm
            token={token}
            onChosen={() => void navigate('/', { replace: true })}
          />
        </>
      )}
    </main>
  );
}
