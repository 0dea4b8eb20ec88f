CREATE TABLE `access_log` (
	`account_id` text NOT NULL,
	`kind` text NOT NULL,
	`subject_type` text NOT NULL,
	`subject_id` text NOT NULL,
	`day` text NOT NULL,
	`count` integer NOT NULL,
	`first_at` text NOT NULL,
	`last_at` text NOT NULL,
	PRIMARY KEY(`account_id`, `kind`, `subject_type`, `subject_id`, `day`),
	FOREIGN KEY (`account_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `access_log_subject` ON `access_log` (`subject_type`,`subject_id`);--> statement-breakpoint
CREATE INDEX `access_log_day` ON `access_log` (`day`);--> statement-breakpoint
CREATE TABLE `access_request` (
	`id` text PRIMARY KEY NOT NULL,
	`account_id` text NOT NULL,
	`folio_id` text NOT NULL,
	`wants` text NOT NULL,
	`message` text,
	`created_at` text NOT NULL,
	`settled_at` text,
	`settled_by` text,
	`outcome` text,
	`answer` text,
	FOREIGN KEY (`account_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`folio_id`) REFERENCES `folio`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`settled_by`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `access_request_folio` ON `access_request` (`folio_id`,`settled_at`);--> statement-breakpoint
CREATE INDEX `access_request_account` ON `access_request` (`account_id`);--> statement-breakpoint
CREATE TABLE `address_change` (
	`id` text PRIMARY KEY NOT NULL,
	`account_id` text NOT NULL,
	`new_email` text NOT NULL,
	`old_token_hash` text NOT NULL,
	`new_token_hash` text NOT NULL,
	`old_confirmed_at` text,
	`new_confirmed_at` text,
	`created_at` text NOT NULL,
	`expires_at` text NOT NULL,
	`done_at` text,
	`cancelled_at` text,
	FOREIGN KEY (`account_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `address_change_account` ON `address_change` (`account_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `address_change_old` ON `address_change` (`old_token_hash`);--> statement-breakpoint
CREATE UNIQUE INDEX `address_change_new` ON `address_change` (`new_token_hash`);--> statement-breakpoint
CREATE TABLE `challenge` (
	`id` text PRIMARY KEY NOT NULL,
	`account_id` text NOT NULL,
	`purpose` text NOT NULL,
	`challenge` text NOT NULL,
	`created_at` text NOT NULL,
	`expires_at` text NOT NULL,
	FOREIGN KEY (`account_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `challenge_account` ON `challenge` (`account_id`,`purpose`);--> statement-breakpoint
CREATE TABLE `password_reset` (
	`id` text PRIMARY KEY NOT NULL,
	`account_id` text NOT NULL,
	`token_hash` text NOT NULL,
	`created_at` text NOT NULL,
	`expires_at` text NOT NULL,
	`used_at` text,
	FOREIGN KEY (`account_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `password_reset_token` ON `password_reset` (`token_hash`);--> statement-breakpoint
CREATE INDEX `password_reset_account` ON `password_reset` (`account_id`);--> statement-breakpoint
CREATE TABLE `recovery_code` (
	`account_id` text NOT NULL,
	`hash` text NOT NULL,
	`created_at` text NOT NULL,
	`used_at` text,
	PRIMARY KEY(`account_id`, `hash`),
	FOREIGN KEY (`account_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `second_factor` (
	`id` text PRIMARY KEY NOT NULL,
	`account_id` text NOT NULL,
	`kind` text NOT NULL,
	`name` text NOT NULL,
	`secret` text,
	`last_step` integer,
	`credential_id` text,
	`public_key` text,
	`counter` integer,
	`transports` text,
	`created_at` text NOT NULL,
	`confirmed_at` text,
	`last_used_at` text,
	FOREIGN KEY (`account_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `second_factor_account` ON `second_factor` (`account_id`);--> statement-breakpoint
CREATE UNIQUE INDEX `second_factor_credential` ON `second_factor` (`credential_id`);--> statement-breakpoint
CREATE TABLE `session` (
	`id` text PRIMARY KEY NOT NULL,
	`account_id` text NOT NULL,
	`second_factor` integer DEFAULT false NOT NULL,
	`user_agent` text,
	`address` text,
	`created_at` text NOT NULL,
	`last_seen_at` text NOT NULL,
	`expires_at` text NOT NULL,
	`ended_at` text,
	FOREIGN KEY (`account_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `session_account` ON `session` (`account_id`,`ended_at`);--> statement-breakpoint
ALTER TABLE `account` ADD `deactivated_at` text;--> statement-breakpoint
ALTER TABLE `account` ADD `version` integer DEFAULT 1 NOT NULL;--> statement-breakpoint
ALTER TABLE `invitation` ADD `sends` integer DEFAULT 1 NOT NULL;--> statement-breakpoint
ALTER TABLE `invitation` ADD `sent_at` text;--> statement-breakpoint
ALTER TABLE `lab` ADD `facility` integer DEFAULT false NOT NULL;--> statement-breakpoint
ALTER TABLE `merge_task` ADD `settled_by` text REFERENCES account(id);--> statement-breakpoint
ALTER TABLE `merge_task` ADD `outcome` text;--> statement-breakpoint
ALTER TABLE `merge_task` ADD `reason` text;--> statement-breakpoint
ALTER TABLE `grant` ADD `terms_licence` text;--> statement-breakpoint
ALTER TABLE `grant` ADD `version` integer DEFAULT 1 NOT NULL;