import bcrypt from 'bcryptjs';
import { services } from './runtime';

/** Hashing must cost an attacker; the tests have no attacker. */
const cost = () => (services().config.isTest ? 4 : 12);

export const hashPassword = (password: string) => bcrypt.hash(password.normalize('NFC'), cost());

/** Of a password that nobody has: an unknown e-mail takes as long to refuse as a known one. */
let nobody: Promise<string> | undefined;

/** bcrypt reads 72 bytes: a longer guess is refused, or it would match whoever has its first 72. */
export async function isPassword(guess: string, hash: string | null): Promise<boolean> {
  nobody ??= hashPassword('nobody has this password');
  const text = guess.normalize('NFC');
  const matches = await bcrypt.compare(text, hash ?? (await nobody));
  return matches && hash !== null && Buffer.byteLength(text) <= 72;
}
