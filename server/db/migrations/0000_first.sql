CREATE TABLE `account` (
	`id` text PRIMARY KEY NOT NULL,
	`account_id` text NOT NULL,
	`provider_id` text NOT NULL,
	`user_id` text NOT NULL,
	`access_token` text,
	`refresh_token` text,
	`id_token` text,
	`access_token_expires_at` integer,
	`refresh_token_expires_at` integer,
	`scope` text,
	`password` text,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `account_user` ON `account` (`user_id`);--> statement-breakpoint
CREATE TABLE `session` (
	`id` text PRIMARY KEY NOT NULL,
	`token` text NOT NULL,
	`user_id` text NOT NULL,
	`expires_at` integer NOT NULL,
	`ip_address` text,
	`user_agent` text,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE UNIQUE INDEX `session_token_unique` ON `session` (`token`);--> statement-breakpoint
CREATE INDEX `session_user` ON `session` (`user_id`);--> statement-breakpoint
CREATE TABLE `user` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`email` text NOT NULL,
	`email_verified` integer DEFAULT false NOT NULL,
	`image` text,
	`role` text DEFAULT 'member' NOT NULL,
	`language` text DEFAULT 'en' NOT NULL,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `user_email_unique` ON `user` (`email`);--> statement-breakpoint
CREATE TABLE `verification` (
	`id` text PRIMARY KEY NOT NULL,
	`identifier` text NOT NULL,
	`value` text NOT NULL,
	`expires_at` integer NOT NULL,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL
);
--> statement-breakpoint
CREATE INDEX `verification_identifier` ON `verification` (`identifier`);--> statement-breakpoint
CREATE TABLE `asset` (
	`sha256` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`media_type` text NOT NULL,
	`bytes` integer NOT NULL,
	`name` text NOT NULL,
	`state` text NOT NULL,
	`facts` text DEFAULT '{}' NOT NULL,
	`trouble` text,
	`uploaded_by` text,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`uploaded_by`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE TABLE `rendition` (
	`sha256` text NOT NULL,
	`name` text NOT NULL,
	`file` text NOT NULL,
	`media_type` text NOT NULL,
	`bytes` integer NOT NULL,
	`width` integer,
	`height` integer,
	PRIMARY KEY(`sha256`, `name`),
	FOREIGN KEY (`sha256`) REFERENCES `asset`(`sha256`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `rendition_file` ON `rendition` (`file`);--> statement-breakpoint
CREATE TABLE `document` (
	`hash` text PRIMARY KEY NOT NULL,
	`json` text NOT NULL,
	`created_at` integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE `draft_conflict` (
	`id` text PRIMARY KEY NOT NULL,
	`guide_id` text NOT NULL,
	`conflict` text NOT NULL,
	`mine_by` text,
	`theirs_by` text,
	`created_at` integer NOT NULL,
	`settled_at` integer,
	FOREIGN KEY (`guide_id`) REFERENCES `guide`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`mine_by`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE set null,
	FOREIGN KEY (`theirs_by`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE INDEX `draft_conflict_guide` ON `draft_conflict` (`guide_id`,`settled_at`);--> statement-breakpoint
CREATE TABLE `draft_state` (
	`guide_id` text NOT NULL,
	`version` integer NOT NULL,
	`document_hash` text NOT NULL,
	`saved_by` text,
	`saved_at` integer NOT NULL,
	PRIMARY KEY(`guide_id`, `version`),
	FOREIGN KEY (`guide_id`) REFERENCES `guide`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`document_hash`) REFERENCES `document`(`hash`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`saved_by`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE TABLE `draft` (
	`guide_id` text PRIMARY KEY NOT NULL,
	`document_hash` text NOT NULL,
	`version` integer NOT NULL,
	`updated_by` text,
	`updated_at` integer NOT NULL,
	FOREIGN KEY (`guide_id`) REFERENCES `guide`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`document_hash`) REFERENCES `document`(`hash`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`updated_by`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE TABLE `guide_member` (
	`guide_id` text NOT NULL,
	`user_id` text NOT NULL,
	`role` text NOT NULL,
	`language` text DEFAULT '' NOT NULL,
	`created_at` integer NOT NULL,
	PRIMARY KEY(`guide_id`, `user_id`, `role`, `language`),
	FOREIGN KEY (`guide_id`) REFERENCES `guide`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `guide_member_user` ON `guide_member` (`user_id`);--> statement-breakpoint
CREATE TABLE `guide` (
	`id` text PRIMARY KEY NOT NULL,
	`slug` text NOT NULL,
	`byline` text NOT NULL,
	`created_at` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `guide_slug_unique` ON `guide` (`slug`);--> statement-breakpoint
CREATE TABLE `invitation` (
	`id` text PRIMARY KEY NOT NULL,
	`guide_id` text NOT NULL,
	`email` text NOT NULL,
	`role` text NOT NULL,
	`language` text DEFAULT '' NOT NULL,
	`token_hash` text NOT NULL,
	`invited_by` text,
	`created_at` integer NOT NULL,
	`expires_at` integer NOT NULL,
	`accepted_at` integer,
	`withdrawn_at` integer,
	FOREIGN KEY (`guide_id`) REFERENCES `guide`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`invited_by`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE set null
);
--> statement-breakpoint
CREATE UNIQUE INDEX `invitation_token_hash_unique` ON `invitation` (`token_hash`);--> statement-breakpoint
CREATE INDEX `invitation_guide` ON `invitation` (`guide_id`);--> statement-breakpoint
CREATE TABLE `revision` (
	`id` text PRIMARY KEY NOT NULL,
	`guide_id` text NOT NULL,
	`number` integer NOT NULL,
	`label` text NOT NULL,
	`document_hash` text NOT NULL,
	`change_class` text,
	`note` text NOT NULL,
	`published_by_name` text NOT NULL,
	`published_by` text,
	`published_at` integer NOT NULL,
	FOREIGN KEY (`guide_id`) REFERENCES `guide`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`document_hash`) REFERENCES `document`(`hash`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`published_by`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE set null,
	CONSTRAINT "revision_label_not_empty" CHECK(length("revision"."label") > 0)
);
--> statement-breakpoint
CREATE UNIQUE INDEX `revision_guide_number` ON `revision` (`guide_id`,`number`);--> statement-breakpoint
CREATE UNIQUE INDEX `revision_guide_label` ON `revision` (`guide_id`,`label`);--> statement-breakpoint
CREATE INDEX `revision_published` ON `revision` (`published_at`);--> statement-breakpoint
CREATE TABLE `import` (
	`id` text PRIMARY KEY NOT NULL,
	`user_id` text NOT NULL,
	`guide_id` text,
	`state` text NOT NULL,
	`understanding` text DEFAULT '{}' NOT NULL,
	`trouble` text,
	`created_at` integer NOT NULL,
	`updated_at` integer NOT NULL,
	FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON UPDATE no action ON DELETE cascade,
	FOREIGN KEY (`guide_id`) REFERENCES `guide`(`id`) ON UPDATE no action ON DELETE cascade
);
--> statement-breakpoint
CREATE INDEX `import_user` ON `import` (`user_id`);--> statement-breakpoint
CREATE TABLE `job` (
	`id` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`payload` text NOT NULL,
	`key` text,
	`state` text NOT NULL,
	`attempts` integer DEFAULT 0 NOT NULL,
	`run_at` integer NOT NULL,
	`error` text,
	`created_at` integer NOT NULL,
	`done_at` integer
);
--> statement-breakpoint
CREATE UNIQUE INDEX `job_key_unique` ON `job` (`key`);--> statement-breakpoint
CREATE INDEX `job_due` ON `job` (`state`,`run_at`);--> statement-breakpoint
CREATE TABLE `mail` (
	`id` text PRIMARY KEY NOT NULL,
	`recipient` text NOT NULL,
	`subject` text NOT NULL,
	`text` text NOT NULL,
	`html` text NOT NULL,
	`language` text NOT NULL,
	`state` text NOT NULL,
	`attempts` integer DEFAULT 0 NOT NULL,
	`error` text,
	`created_at` integer NOT NULL,
	`sent_at` integer
);
--> statement-breakpoint
CREATE INDEX `mail_created` ON `mail` (`created_at`);