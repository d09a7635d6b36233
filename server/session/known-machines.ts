import { createHmac, randomBytes, timingSafeEqual } from 'node:crypto';

export const knownMachineCookie = 'kneeboard_machine';
export const knownMachineDays = 400;
/** Accounts that may be remembered on one machine: an office's shared one. */
const mostAccounts = 5;

/**
 * A machine on which somebody signed in before: who guesses from elsewhere does not slow it down (OWASP's device cookies). The cookie
 * holds one token an account, nonce and MAC: the MAC over account and nonce under the session secret, so nothing is stored and no
 * account is named. It opens nothing by itself: it only chooses whose guesses the next ones are counted with.
 */
export function knownMachines(secret: string) {
  const macOf = (account: string, nonce: string): Buffer => createHmac('sha256', secret).update(`known machine|${account}|${nonce}`).digest();
  const tokensIn = (cookies: string | undefined): string[] => {
    const value = new RegExp(`(?:^|;\\s*)${knownMachineCookie}=([\\w.-]{1,600})(?:;|$)`).exec(cookies ?? '')?.[1] ?? '';
    return value.split('.').filter((token) => /^[\w-]{22}[\w-]{43}$/.test(token)).slice(-mostAccounts);
  };
  const nonceFor = (account: string, token: string): string | undefined => {
    const [nonce, mac] = [token.slice(0, 22), Buffer.from(token.slice(22), 'base64url')];
    const own = macOf(account, nonce);
    return mac.length === own.length && timingSafeEqual(mac, own) ? nonce : undefined;
  };
  return {
    /** Names the machine among this account's; undefined on one where the account never signed in. */
    recognise: (cookies: string | undefined, email: string): string | undefined => tokensIn(cookies).map((token) => nonceFor(email.toLowerCase(), token)).find((nonce) => nonce !== undefined),
    /** The cookie's value after this account signed in. */
    remember(cookies: string | undefined, email: string): string {
      const tokens = tokensIn(cookies);
      const account = email.toLowerCase();
      if (tokens.some((token) => nonceFor(account, token) !== undefined)) return tokens.join('.');
      const nonce = randomBytes(16).toString('base64url');
      return [...tokens, `${nonce}${macOf(account, nonce).toString('base64url')}`].slice(-mostAccounts).join('.');
    },
  };
}
