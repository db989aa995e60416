/** A phone's own build is renewed by its shop: nothing to watch for here. */
export const programVersion = {
  watch: (): void => {},
  useNewer: (): boolean => false,
  take: (): void => {},
};
