/** The few words of autocannon that the benchmark uses; the package brings no types. */
declare module 'autocannon' {
  type Options = {
    url: string;
    headers?: Record<string, string>;
    connections: number;
    /** Seconds. */
    duration: number;
    /** Threads of its own, so that the load does not run on the servers' event loop. */
    workers?: number;
  };
  type Result = {
    non2xx: number;
    errors: number;
    requests: { average: number };
    /** Milliseconds. */
    latency: { p50: number; p99: number };
  };
  export default function autocannon(options: Options): Promise<Result>;
}
