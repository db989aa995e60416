declare module 's3rver' {
  type Settings = {
    address: string;
    port: number;
    silent: boolean;
    directory: string;
    configureBuckets: { name: string }[];
  };
  export default class S3rver {
    constructor(settings: Settings);
    run(): Promise<{ port: number }>;
    close(): Promise<void>;
  }
}
