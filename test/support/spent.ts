/** Milliseconds of this process's own time, which other work on the machine does not lengthen. */
export function spent(): number {
  const { user, system } = process.cpuUsage();
  return (user + system) / 1000;
}
