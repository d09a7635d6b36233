/** The only place the service reads the time. */
export interface Clock {
  now(): Date;
}
export const systemClock: Clock = { now: () => new Date() };
