CREATE TABLE `level_fit` (
	`id` text PRIMARY KEY NOT NULL,
	`complex_id` text NOT NULL,
	`centre_ordinal` integer NOT NULL,
	`maker_id` text NOT NULL,
	`input` text NOT NULL,
	`result` text NOT NULL,
	`release` text NOT NULL,
	`note` text,
	`visibility` text DEFAULT 'programme' NOT NULL,
	`created_at` text NOT NULL,
	`withdrawn_at` text,
	FOREIGN KEY (`complex_id`) REFERENCES `complex`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`maker_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `level_fit_complex` ON `level_fit` (`complex_id`,`centre_ordinal`);