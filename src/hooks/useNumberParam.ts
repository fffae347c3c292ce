import { useParams } from 'react-router-dom';

/** A whole number from the address; NaN when it is none, so that the server answers 404. */
export function useNumberParam(name: string): number {
  const value = useParams()[name] ?? '';
  return /^[1-9]\d{0,15}$/.test(value) ? Number(value) : NaN;
}
