import { demoAgeInDays } from './demo-data';
import { say } from './tell';

export type SignIn = { email: string; password: string; name: string; role: string };

/** Lines of a table with columns as wide as their longest cell. */
export function columns(rows: readonly (readonly string[])[]): string[] {
  const widths = rows.reduce<number[]>(
    (wide, row) => row.map((cell, at) => Math.max(cell.length, wide[at] ?? 0)),
    [],
  );
  return rows.map((row) =>
    row
      .map((cell, at) => cell.padEnd(widths[at] ?? 0))
      .join('  ')
      .trimEnd(),
  );
}

/** Tells the address, the mailbox page and the demo sign-ins. */
export async function announceDemo(address: string, now: number): Promise<void> {
  const { demoSignIns } = await import('../demo/people');
  say();
  say(`Brimline   ${address}`);
  say(`Mailbox    ${address}/mailbox   (mail of the demo stays on this machine)`);
  say();
  say('Demo people:');
  for (const line of columns(
    demoSignIns.map((one: SignIn) => [one.role, one.name, one.email, one.password]),
  )) {
    say(`  ${line}`);
  }
  const days = demoAgeInDays(now);
  if (days > 0) {
    say();
    say(
      `The demo was made ${days === 1 ? 'a day' : `${days} days`} ago, so its orders have lapsed or are overdue.`,
    );
    say('npm run demo:fresh makes it anew.');
  }
  say();
  say('Ctrl-C stops everything.');
}
