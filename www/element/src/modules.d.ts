declare module "*.txt" {
  const text: string;
  export default text;
}

declare module "node:fs/promises" {
  export function readFile(path: string | URL): Promise<Uint8Array<ArrayBuffer>>;
}

declare module "node:worker_threads" {
  export class Worker {
    constructor(source: string, options: { eval: true });
    on(event: "message" | "error", listener: (value: unknown) => void): void;
    postMessage(message: unknown): void;
    ref(): void;
    unref(): void;
    terminate(): Promise<number>;
  }
}
