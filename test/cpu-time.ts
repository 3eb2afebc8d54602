/** Milliseconds of processor time this process has used: unlike the clock, hardly moved by what else the machine does. */
export function cpuMilliseconds(): number {
  const { user, system } = process.cpuUsage();
  return (user + system) / 1000;
}
