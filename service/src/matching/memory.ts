/** Maker of the memory of typed arrays: plain, or shared between threads. */
export type Memory = (bytes: number) => ArrayBufferLike;
export const plainMemory: Memory = (bytes) => new ArrayBuffer(bytes);
export const sharedMemory: Memory = (bytes) => new SharedArrayBuffer(bytes);
