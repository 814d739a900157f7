declare module 's3rver' {
  type Options = {
    address: string;
    port: number;
    directory: string;
    silent?: boolean;
    configureBuckets?: { name: string; configs: string[] }[];
  };
  export default class S3rver {
    constructor(options: Options);
    run(): Promise<unknown>;
    close(): Promise<void>;
  }
}
