import { randomInt } from "node:crypto";
import { existsSync, readFileSync, writeFileSync } from "node:fs";

/** The people of the demo team, Saltmarsh Sensing: one in each role. */
const PEOPLE = [
  { name: "Maren Holt", email: "maren@saltmarsh.example", role: "owner" },
  { name: "Idris Vane", email: "idris@saltmarsh.example", role: "designer" },
  { name: "Tove Lund", email: "tove@saltmarsh.example", role: "reviewer" },
  { name: "Paul Serra", email: "paul@estuary-circuits.example", role: "manufacturer" },
];

// No letters or digits that are mistaken for one another when read from a terminal.
const LETTERS = "abcdefghijkmnpqrstuvwxyz23456789";

/** Makes the demo people's passwords for this installation and keeps them where only its owner reads. */
export function makeDemoAccounts(file) {
  const accounts = PEOPLE.map((person) => ({ ...person, password: makePassword() }));
  writeFileSync(file, `${JSON.stringify(accounts, null, 2)}\n`, { mode: 0o600 });
  return accounts;
}

/** The demo people with their passwords; none where no demo was made. */
export function readDemoAccounts(file) {
  return existsSync(file) ? JSON.parse(readFileSync(file, "utf8")) : [];
}

/** Four groups of four: 80 bits. */
function makePassword() {
  const group = () => Array.from({ length: 4 }, () => LETTERS[randomInt(LETTERS.length)]).join("");
  return [group(), group(), group(), group()].join("-");
}
