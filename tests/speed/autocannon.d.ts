/** The part of autocannon that the benchmarks use; the package brings no types. */
declare module 'autocannon' {
  interface Options {
    url: string;
    connections: number;
    duration: number;
    headers?: Readonly<Record<string, string>>;
  }
  interface Result {
    requests: { average: number };
    non2xx: number;
    errors: number;
  }
  export default function autocannon(options: Options): Promise<Result>;
}
