/** An invented bake to look at: a panel and a door edge warm up for 12 min, hold, and cool. Every 10 s, in Celsius. */
export function exampleTrace(): string {
  const lines = ['Logger;bake 4', 'Time;Panel °C;Edge °C'];
  for (let second = 0; second <= 55 * 60; second += 10) {
    const minute = second / 60;
    const rise = 1 - Math.exp(-minute / 4.5);
    const fall = minute > 42 ? Math.exp(-(minute - 42) / 9) : 1;
    const panel = 21 + 41 * rise * fall + 0.4 * Math.sin(minute * 1.7);
    const edge = 21 + 37 * (1 - Math.exp(-minute / 6)) * fall + 0.3 * Math.sin(minute * 1.3);
    const clock = [10, Math.floor(minute), second % 60].map((part) => String(part).padStart(2, '0')).join(':');
    // Two faults, as real files have them.
    const edgeCell = second === 600 ? '' : edge.toFixed(1).replace('.', ',');
    lines.push(`${clock};${second === 1200 ? 'OPEN' : panel.toFixed(1).replace('.', ',')};${edgeCell}`);
  }
  return lines.join('\n');
}
