import { config } from "zod/v4/core";

// Runs before any page's code. Without eval under our content policy, each schema would probe for it as it is
// made and report a violation; the setting must come before the first of them.
config({ jitless: true });
