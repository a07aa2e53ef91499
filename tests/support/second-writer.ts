/** Writes to a database that another process writes to: second-writer.ts URL COUNT. */
import { openDatabase } from "@/lib/db/client";

const [url = "", writes = "0"] = process.argv.slice(2);
const open = await openDatabase(url);
for (let n = 0; n < Number(writes); n++)
  await open.client.batch([
    { sql: "insert into written values (3, ?)", args: [n] },
    { sql: "insert into written values (4, ?)", args: [n] },
  ]);
open.close();
