/** Runs an act while no other holder of the same name runs. One program, one tab: nothing to wait for. */
export const oneAtATime = <T>(_name: string, act: () => Promise<T>): Promise<T> => act();
