DROP INDEX `job_due`;--> statement-breakpoint
ALTER TABLE `job` ADD `rank` integer DEFAULT 0 NOT NULL;--> statement-breakpoint
CREATE INDEX `job_due` ON `job` (`state`,`rank`,`run_at`);--> statement-breakpoint
CREATE INDEX `draft_state_document` ON `draft_state` (`document_hash`);--> statement-breakpoint
CREATE INDEX `revision_document` ON `revision` (`document_hash`);