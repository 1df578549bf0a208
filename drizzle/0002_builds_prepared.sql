CREATE TABLE `build_logs` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`build_id` integer NOT NULL,
	`kind` text NOT NULL,
	`text` text NOT NULL,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `build_logs_build` ON `build_logs` (`build_id`,`id`);--> statement-breakpoint
CREATE TABLE `build_previews` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`library_id` integer NOT NULL,
	`source` text NOT NULL,
	`address` text,
	`ref` text,
	`commit` text,
	`subject` text,
	`content_hash` text,
	`source_key` text,
	`label` text NOT NULL,
	`folder` text,
	`recipe` text,
	`issues` text NOT NULL,
	`manifest_hash` text,
	`submodules` text NOT NULL,
	`build_id` integer,
	`created_at` integer NOT NULL,
	`created_by` text NOT NULL,
	`expires_at` integer NOT NULL,
	FOREIGN KEY (`library_id`) REFERENCES `libraries`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `build_previews_expiry` ON `build_previews` (`expires_at`);--> statement-breakpoint
ALTER TABLE `builds` ADD `address` text;--> statement-breakpoint
ALTER TABLE `builds` ADD `ref` text;--> statement-breakpoint
ALTER TABLE `builds` ADD `subject` text;--> statement-breakpoint
ALTER TABLE `builds` ADD `content_hash` text;--> statement-breakpoint
ALTER TABLE `builds` ADD `source_key` text;--> statement-breakpoint
ALTER TABLE `builds` ADD `state` text DEFAULT 'ready' NOT NULL;--> statement-breakpoint
ALTER TABLE `builds` ADD `reason` text;--> statement-breakpoint
ALTER TABLE `builds` ADD `is_log_cut` integer DEFAULT false NOT NULL;--> statement-breakpoint
CREATE UNIQUE INDEX `builds_library_content` ON `builds` (`library_id`,`content_hash`) WHERE "builds"."content_hash" is not null;