/** Leaves for somebody else's page, such as the payment provider's, in this window: it sends its reader back here. */
export const goTo = (url: string): void => location.assign(url);
