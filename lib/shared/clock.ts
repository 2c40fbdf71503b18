/** Source of the present instant; injected so that tests can fix it. */
export type Clock = () => Date;

export const systemClock: Clock = () => new Date();
