// @ts-check

/** @typedef {{ role: string, email: string, password: string }} SignIn */

/**
 * The demo's sign-ins out of what the seed printed: its last line that is JSON with `signIns`. Other lines are its log.
 * @param {string} printed
 * @returns {SignIn[]}
 */
export function signInsFrom(printed) {
  for (const line of printed.split('\n').reverse()) {
    if (!line.startsWith('{')) continue;
    try {
      const { signIns } = JSON.parse(line);
      if (Array.isArray(signIns)) return signIns;
    } catch {
      continue;
    }
  }
  return [];
}

/**
 * The sign-ins as lines with straight columns.
 * @param {readonly SignIn[]} signIns
 */
export function signInLines(signIns) {
  const width = (/** @type {'role' | 'email'} */ key) => Math.max(...signIns.map((each) => each[key].length));
  return signIns.map(({ role, email, password }) => `  ${role.padEnd(width('role'))}  ${email.padEnd(width('email'))}  ${password}`);
}
