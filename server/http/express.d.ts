import { type Actor, type PersonActor } from './actor';

declare global {
  namespace Express {
    interface User extends PersonActor {
      readonly signedInAt: number;
    }
    interface Request {
      actor?: Actor;
    }
  }
}
