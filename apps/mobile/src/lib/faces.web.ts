/** On the web the face comes with the page's own style sheet. */
export const useFaces = (): boolean => true;
