import { createHash, randomBytes, timingSafeEqual } from 'node:crypto';

const newToken = (): string => randomBytes(32).toString('base64url');
const digest = (text: string): Buffer => createHash('sha256').update(text).digest();
/** Compared by digest, so that neither length nor contents show in the time it takes. */
const isSame = (given: string, kept: string | null): boolean =>
  kept !== null && timingSafeEqual(digest(given), digest(kept));

/**
 * Who may speak to the loopback host: one window at a time. The launch token stands in the address that the window is opened with
 * (in the fragment, which no request carries) and works once; it buys the session token, which the page sends with every call.
 * Another local user who reads the address from the list of processes therefore comes too late.
 */
export class Admission {
  #launch: string | null = newToken();
  #session: string | null = null;

  /** The token for a new address; ends the session before it. */
  renew(): string {
    this.#session = null;
    this.#launch = newToken();
    return this.#launch;
  }

  get launch(): string | null {
    return this.#launch;
  }

  /** The session for a launch token that was not used yet; null for any other. */
  claim(token: string): string | null {
    if (!isSame(token, this.#launch)) return null;
    this.#launch = null;
    this.#session = newToken();
    return this.#session;
  }

  isAdmitted(session: string): boolean {
    return isSame(session, this.#session);
  }
}
