import { type Config } from './config';
import { type Clock } from './platform/clock';
import { type Database } from './platform/database';
import { type Log } from './platform/log';
import { type Mail } from './platform/mail';
import { type Queue } from './platform/queue';
import { type Storage } from './platform/storage';

/** The outside world, handed in: services reach nothing else. */
export interface Deps {
  readonly config: Config;
  readonly database: Database;
  readonly storage: Storage;
  readonly mail: Mail;
  readonly queue: Queue;
  readonly clock: Clock;
  readonly log: Log;
}
