// A request that the front refuses: with which status, and in which sentence.
export interface Refusal {
  status: number;
  code: string;
  title: string;
  headers?: Record<string, string>;
}
