/** The client's screens that a mailed link opens, each with `?token=`; the last opens a chart by its id. */
export const MAILED_SCREEN = {
  verify: '/verify',
  reset: '/reset-password',
  invitation: '/invitation',
} as const;

export type MailedScreen = keyof typeof MAILED_SCREEN;

/** The whole address of a mailed link. `publicUrl` has no slash at its end. */
export function mailedLink(publicUrl: string, screen: MailedScreen, token: string): string {
  return `${publicUrl}${MAILED_SCREEN[screen]}?token=${encodeURIComponent(token)}`;
}

/** Where a mail about a chart leads. */
export function chartLink(publicUrl: string, chartId: string): string {
  return `${publicUrl}/water/charts/${chartId}`;
}
