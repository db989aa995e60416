/**
 * Runs an act while no other tab runs the one of the same name. A refresh token is good once, so two tabs
 * sending the same one at the same moment would look like a theft. Plain http off localhost has no locks.
 */
export async function oneAtATime<T>(name: string, act: () => Promise<T>): Promise<T> {
  if (!('locks' in navigator)) return act();
  return navigator.locks.request(name, act);
}
