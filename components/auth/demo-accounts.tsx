import { Button } from "@/components/ui/button";

export interface DemoAccount {
  name: string;
  email: string;
  role: string;
  password: string;
}

interface Props {
  accounts: readonly DemoAccount[];
  onPick: (account: DemoAccount) => void;
}

/** The people of the demo team, each one click away. Exists only on a new database served to this computer. */
export function DemoAccounts({ accounts, onPick }: Props) {
  return (
    <section aria-labelledby="demo" className="border-rule-line flex flex-col gap-3 border-t pt-6">
      <h2 id="demo" className="text-base font-semibold">
        Look around the demo team
      </h2>
      <p className="text-ink-soft text-sm">
        Saltmarsh Sensing has one person in each role. Sign in as any of them; the passwords were made for
        this installation alone.
      </p>
      <ul className="flex flex-col">
        {accounts.map((account) => (
          <li
            key={account.email}
            className="border-rule-line/60 flex items-center justify-between gap-4 border-t py-2 first:border-t-0"
          >
            <span className="min-w-0 text-sm">
              <span className="font-medium">{account.name}</span>
              <span className="text-ink-soft"> · {account.role}</span>
            </span>
            <Button
              onClick={() => onPick(account)}
              aria-label={`Sign in as ${account.name}, ${account.role}`}
            >
              Sign in as {account.role}
            </Button>
          </li>
        ))}
      </ul>
    </section>
  );
}
