import { LinkButton } from '@/components/Button';
import { EmptyState } from '@/components/states';

export function NotFoundPage() {
  return (
    <main className="page">
      <EmptyState
        title="There is no such page"
        action={<LinkButton to="/">To the studies</LinkButton>}
      >
        The address may be mistyped, or what it led to belongs to another lab.
      </EmptyState>
    </main>
  );
}
