CREATE TABLE `builds` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`library_id` integer NOT NULL,
	`label` text NOT NULL,
	`commit` text,
	`source` text NOT NULL,
	`folder` text NOT NULL,
	`recipe` text NOT NULL,
	`manifest_hash` text NOT NULL,
	`created_at` integer NOT NULL,
	`created_by` text NOT NULL,
	FOREIGN KEY (`library_id`) REFERENCES `libraries`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `builds_library_commit` ON `builds` (`library_id`,`commit`) WHERE "builds"."commit" is not null;--> statement-breakpoint
CREATE INDEX `builds_library` ON `builds` (`library_id`,`id`);--> statement-breakpoint
CREATE TABLE `libraries` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`slug` text NOT NULL,
	`name` text NOT NULL,
	`description` text NOT NULL,
	`homepage` text,
	`created_at` integer NOT NULL,
	`created_by` text NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `libraries_slug` ON `libraries` (`slug`);--> statement-breakpoint
CREATE TABLE `solvers` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`library_id` integer NOT NULL,
	`name` text NOT NULL,
	`declared` integer NOT NULL,
	`declaration` text NOT NULL,
	`build_id` integer NOT NULL,
	`updated_at` integer NOT NULL,
	FOREIGN KEY (`library_id`) REFERENCES `libraries`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `solvers_library_name` ON `solvers` (`library_id`,`name`);--> statement-breakpoint
CREATE TABLE `audit_log` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`at` integer NOT NULL,
	`actor` text NOT NULL,
	`action` text NOT NULL,
	`library_id` integer,
	`subject` text NOT NULL,
	`detail` text NOT NULL,
	FOREIGN KEY (`library_id`) REFERENCES `libraries`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `audit_log_library` ON `audit_log` (`library_id`,`id`);--> statement-breakpoint
CREATE TABLE `jobs` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`kind` text NOT NULL,
	`subject` integer NOT NULL,
	`status` text NOT NULL,
	`attempts` integer NOT NULL,
	`owner` text,
	`lease_until` integer,
	`error` text,
	`created_at` integer NOT NULL,
	`finished_at` integer
);
--> statement-breakpoint
CREATE INDEX `jobs_status` ON `jobs` (`status`,`id`);--> statement-breakpoint
CREATE INDEX `jobs_subject` ON `jobs` (`kind`,`subject`);--> statement-breakpoint
CREATE TABLE `allowance_revisions` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`library_id` integer NOT NULL,
	`number` integer NOT NULL,
	`allowances` text NOT NULL,
	`reason` text NOT NULL,
	`created_at` integer NOT NULL,
	`created_by` text NOT NULL,
	FOREIGN KEY (`library_id`) REFERENCES `libraries`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `allowance_revisions_library_number` ON `allowance_revisions` (`library_id`,`number`);--> statement-breakpoint
CREATE TABLE `reference_chains` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`library_id` integer NOT NULL,
	`suite_id` integer NOT NULL,
	`platform` text NOT NULL,
	`created_at` integer NOT NULL,
	FOREIGN KEY (`library_id`) REFERENCES `libraries`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`suite_id`) REFERENCES `suites`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `reference_chains_key` ON `reference_chains` (`library_id`,`suite_id`,`platform`);--> statement-breakpoint
CREATE TABLE `reference_entries` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`chain_id` integer NOT NULL,
	`number` integer NOT NULL,
	`solver` text NOT NULL,
	`case` text NOT NULL,
	`start` integer NOT NULL,
	`solve_id` integer,
	`reason` text,
	`decided_by` text,
	`decided_at` integer,
	FOREIGN KEY (`chain_id`) REFERENCES `reference_chains`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`solve_id`) REFERENCES `solves`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`chain_id`,`number`) REFERENCES `reference_revisions`(`chain_id`,`number`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `reference_entries_key` ON `reference_entries` (`chain_id`,`solver`,`case`,`start`,`number`);--> statement-breakpoint
CREATE INDEX `reference_entries_solve` ON `reference_entries` (`solve_id`);--> statement-breakpoint
CREATE TABLE `reference_revisions` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`chain_id` integer NOT NULL,
	`number` integer NOT NULL,
	`parent_id` integer,
	`run_id` integer,
	`reason` text NOT NULL,
	`changed` integer NOT NULL,
	`created_at` integer NOT NULL,
	`created_by` text NOT NULL,
	FOREIGN KEY (`chain_id`) REFERENCES `reference_chains`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`run_id`) REFERENCES `runs`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`parent_id`) REFERENCES `reference_revisions`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `reference_revisions_chain_number` ON `reference_revisions` (`chain_id`,`number`);--> statement-breakpoint
CREATE TABLE `paths` (
	`solve_id` integer PRIMARY KEY NOT NULL,
	`data` blob NOT NULL,
	FOREIGN KEY (`solve_id`) REFERENCES `solves`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `run_solvers` (
	`run_id` integer NOT NULL,
	`position` integer NOT NULL,
	`name` text NOT NULL,
	`declaration` text NOT NULL,
	PRIMARY KEY(`run_id`, `position`),
	FOREIGN KEY (`run_id`) REFERENCES `runs`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `run_solvers_name` ON `run_solvers` (`run_id`,`name`);--> statement-breakpoint
CREATE TABLE `runs` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`library_id` integer NOT NULL,
	`build_id` integer NOT NULL,
	`suite_id` integer NOT NULL,
	`revision_id` integer NOT NULL,
	`status` text NOT NULL,
	`phase` text NOT NULL,
	`reason` text,
	`settings` text NOT NULL,
	`base_run_id` integer,
	`base_reference_id` integer,
	`planned` integer NOT NULL,
	`stored` integer NOT NULL,
	`solved` integer NOT NULL,
	`evaluations` integer NOT NULL,
	`to_confirm` integer NOT NULL,
	`confirmed` integer NOT NULL,
	`unsteady` integer NOT NULL,
	`environment` text,
	`adapter_text` text,
	`log` text NOT NULL,
	`elapsed_ms` real NOT NULL,
	`created_at` integer NOT NULL,
	`created_by` text NOT NULL,
	`started_at` integer,
	`finished_at` integer,
	FOREIGN KEY (`library_id`) REFERENCES `libraries`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`build_id`) REFERENCES `builds`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`suite_id`) REFERENCES `suites`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`revision_id`) REFERENCES `suite_revisions`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`base_run_id`) REFERENCES `runs`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `runs_library` ON `runs` (`library_id`,`id`);--> statement-breakpoint
CREATE INDEX `runs_build` ON `runs` (`build_id`,`id`);--> statement-breakpoint
CREATE INDEX `runs_suite` ON `runs` (`suite_id`,`id`);--> statement-breakpoint
CREATE INDEX `runs_status` ON `runs` (`status`,`id`);--> statement-breakpoint
CREATE TABLE `solves` (
	`id` integer PRIMARY KEY NOT NULL,
	`run_id` integer NOT NULL,
	`solver` integer NOT NULL,
	`case_id` integer NOT NULL,
	`start` integer NOT NULL,
	`outcome` integer NOT NULL,
	`iterations` integer,
	`iterations_from` integer,
	`evaluations` integer NOT NULL,
	`f` integer NOT NULL,
	`df` integer NOT NULL,
	`d2f` integer NOT NULL,
	`root` real,
	`nearest` integer,
	`error` real,
	`digits` real,
	`exact` integer NOT NULL,
	`ulps` real,
	`residual` real,
	`order_status` integer NOT NULL,
	`order_kind` integer,
	`order_value` real,
	`order_low` real,
	`order_high` real,
	`order_steps` integer NOT NULL,
	`rate` real,
	`rate_low` real,
	`rate_high` real,
	`constant` real,
	`period` integer,
	`repeated` integer NOT NULL,
	`outside` integer NOT NULL,
	`late` integer NOT NULL,
	`unused` integer NOT NULL,
	`non_finite` integer NOT NULL,
	`path_hash` blob NOT NULL,
	`steady` integer,
	`elapsed_ms` real NOT NULL,
	`remarks` text,
	FOREIGN KEY (`case_id`) REFERENCES `cases`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`run_id`,`solver`) REFERENCES `run_solvers`(`run_id`,`position`) ON UPDATE no action ON DELETE no action,
	CONSTRAINT "solves_finite" CHECK((root is null or abs(root) <= 1.7976931348623157e308) and (error is null or abs(error) <= 1.7976931348623157e308) and (digits is null or abs(digits) <= 1.7976931348623157e308) and (ulps is null or abs(ulps) <= 1.7976931348623157e308) and (residual is null or abs(residual) <= 1.7976931348623157e308) and (order_value is null or abs(order_value) <= 1.7976931348623157e308) and (order_low is null or abs(order_low) <= 1.7976931348623157e308) and (order_high is null or abs(order_high) <= 1.7976931348623157e308) and (rate is null or abs(rate) <= 1.7976931348623157e308) and (rate_low is null or abs(rate_low) <= 1.7976931348623157e308) and (rate_high is null or abs(rate_high) <= 1.7976931348623157e308) and (constant is null or abs(constant) <= 1.7976931348623157e308) and (elapsed_ms is null or abs(elapsed_ms) <= 1.7976931348623157e308))
);
--> statement-breakpoint
CREATE UNIQUE INDEX `solves_key` ON `solves` (`run_id`,`solver`,`case_id`,`start`);--> statement-breakpoint
CREATE TABLE `cases` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`revision_id` integer NOT NULL,
	`name` text NOT NULL,
	`hash` text NOT NULL,
	`data` text NOT NULL,
	FOREIGN KEY (`revision_id`) REFERENCES `suite_revisions`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `cases_revision_name` ON `cases` (`revision_id`,`name`);--> statement-breakpoint
CREATE TABLE `suite_revisions` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`suite_id` integer NOT NULL,
	`number` integer NOT NULL,
	`hash` text NOT NULL,
	`title` text NOT NULL,
	`evaluations` integer NOT NULL,
	`seconds` real NOT NULL,
	`case_count` integer NOT NULL,
	`source` text NOT NULL,
	`note` text NOT NULL,
	`created_at` integer NOT NULL,
	`created_by` text NOT NULL,
	FOREIGN KEY (`suite_id`) REFERENCES `suites`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `suite_revisions_suite_number` ON `suite_revisions` (`suite_id`,`number`);--> statement-breakpoint
CREATE INDEX `suite_revisions_suite_hash` ON `suite_revisions` (`suite_id`,`hash`);--> statement-breakpoint
CREATE TABLE `suites` (
	`id` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`slug` text NOT NULL,
	`built_in` integer NOT NULL,
	`created_at` integer NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `suites_slug` ON `suites` (`slug`);