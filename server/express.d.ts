import type { SignedInActor } from './context';

declare global {
  namespace Express {
    interface Request {
      actor?: SignedInActor;
      requestId: string;
    }
  }
}
