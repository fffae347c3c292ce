import { useState } from 'react';
import type { Sort } from '@/components/DataTable';

/** The sort of a table that is too small for the URL. */
export function useSort(first: Sort | null = null) {
  const [by, onSorted] = useState<Sort | null>(first);
  return { by, onSorted };
}
