/** Seconds that this process has worked: a busy machine changes little about them. */
export const coreSeconds = (): number => process.cpuUsage().user / 1e6;
