import { createHash } from "node:crypto";
import type { Digest } from "../report/repeat-sheet.ts";

export const digest: Digest = async (content) => createHash("sha256").update(content).digest("hex");
