/** The part of the package that the tests use: it brings no types. */
declare module 's3rver' {
  class S3rver {
    constructor(options: {
      address: string;
      port: number;
      silent: boolean;
      directory: string;
      configureBuckets: readonly { name: string }[];
    });
    run(): Promise<{ address: string; port: number }>;
    close(): Promise<void>;
  }

  export { S3rver as default };
}
