/** Passwords with bcrypt, slow on purpose. */
import bcrypt from "bcryptjs";
import { settings } from "./settings";

/** Hash to keep of a new password. */
export function hashPassword(password: string): Promise<string> {
  return bcrypt.hash(password, settings().PASSWORD_COST);
}

let nobody: Promise<string> | null = null;

/**
 * Whether a password is right. With no hash (no such person) the same work is done, so that the time taken does not
 * tell whether an account exists.
 */
export async function isPassword(password: string, hash: string | null): Promise<boolean> {
  nobody ??= hashPassword("nobody has this password");
  const right = await bcrypt.compare(password, hash ?? (await nobody));
  return right && hash !== null;
}
