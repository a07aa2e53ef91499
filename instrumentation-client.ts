import { z } from "zod";

// Runs before any page's code. Without eval under our content policy, each schema would probe for it as it is
// made and report a violation; the setting must come before the first of them.
z.config({ jitless: true });
