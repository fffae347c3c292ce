import { useEffect } from 'react';

/** Names the page in the browser’s own title. */
export function useTitle(title: string): void {
  useEffect(() => {
    document.title = `${title} · Cragline`;
  }, [title]);
}
