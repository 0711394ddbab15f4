const USUAL = 3000;

/**
 * The port that a setting asks for; the usual one when it says nothing, null when it is no port.
 * @param {string | undefined} setting
 * @returns {number | null}
 */
export function wantedPort(setting) {
  const text = setting?.trim() ?? "";
  if (text === "") return USUAL;
  const port = /^\d{1,5}$/.test(text) ? Number(text) : 0;
  return port >= 1 && port <= 65_535 ? port : null;
}
