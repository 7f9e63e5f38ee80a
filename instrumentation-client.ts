/** Runs before the app in the browser. The page's policy refuses eval, which zod would otherwise try for speed. */
import { z } from "zod";

z.config({ jitless: true });
