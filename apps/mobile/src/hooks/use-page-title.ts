/** A page's title belongs to the browser's tab; elsewhere there is none. */
export function usePageTitle(_title: string): void {}
