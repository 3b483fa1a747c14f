/** What the routes work with. */
import type { Logger } from "pino";
import type { Settings } from "../config.ts";
import type { Desk } from "../engine/desk.ts";
import type { JobEvents } from "../jobs/events.ts";
import type { Jobs } from "../jobs/jobs.ts";

export interface Service {
  readonly settings: Pick<Settings, "bodyBytes">;
  readonly jobs: Jobs;
  readonly events: JobEvents;
  /** Where downloads are written that take long to write. */
  readonly desk: Desk;
  readonly log: Logger;
  /** Folder of the built page. */
  readonly viewer: URL;
  /** False before all is up, and from the moment of shutting down. */
  ready(): boolean;
  /** True from the moment of shutting down. */
  closing(): boolean;
}
