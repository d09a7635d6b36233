declare module 's3rver' {
  import { type RequestListener } from 'node:http';

  /** What we use of the stand-in; the package brings no types. */
  export default class S3rver {
    constructor(options: { directory: string; silent: boolean; vhostBuckets: boolean; configureBuckets: { name: string; configs: string[] }[] });
    configureBuckets(): Promise<unknown>;
    callback(): RequestListener;
  }
}
