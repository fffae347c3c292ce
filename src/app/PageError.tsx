import { useRouteError } from 'react-router-dom';
import { Button, LinkButton } from '@/components/Button';
import { Notice } from '@/components/Notice';

/** What a page shows when it broke: what is known, and two ways on. */
export function PageError() {
  const error = useRouteError();
  return (
    <main className="page">
      <div className="grid gap-4 max-w-form justify-items-start">
        <Notice tone="stop" claim="This page broke.">
          {error instanceof Error ? error.message : 'No more is known.'} What the server has saved
          is safe.
        </Notice>
        <div className="flex gap-2">
          <Button
            onClick={() => {
              window.location.reload();
            }}
          >
            Load it again
          </Button>
          <LinkButton to="/" look="quiet">
            To the studies
          </LinkButton>
        </div>
      </div>
    </main>
  );
}
