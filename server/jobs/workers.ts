/** Heavy numerics run in worker threads and never block a request. */
export interface Workers {
  /** Runs `name`, registered in jobs/tasks/index.ts, on a worker thread; input and output are cloned. The signal ends the thread. */
  run<Output>(name: string, input: unknown, signal?: AbortSignal): Promise<Output>
  close(): Promise<void>
}

/** Whether a task failed because it wanted more memory than a thread may have. */
export const isOutOfMemory = (error: unknown): boolean =>
  error instanceof Error && 'code' in error && error.code === 'ERR_WORKER_OUT_OF_MEMORY'
