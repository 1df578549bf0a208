/** Milliseconds since 1970, UTC. Passed in, so that tests can set it. */
export type Clock = () => number;

export const systemClock: Clock = () => Date.now();
