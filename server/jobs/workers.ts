/** Heavy numerics run in worker threads and never block a request. */
export interface Workers {
  /** Runs `name`, registered in jobs/tasks/index.ts, on a worker thread; input and output are cloned. */
  run<Output>(name: string, input: unknown, signal?: AbortSignal): Promise<Output>
  close(): Promise<void>
}
