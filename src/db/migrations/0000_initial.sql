CREATE TABLE `access_token` (
	`id` text PRIMARY KEY NOT NULL,
	`account_id` text NOT NULL,
	`name` text NOT NULL,
	`hash` text NOT NULL,
	`scopes` text NOT NULL,
	`lab_id` text,
	`created_at` text NOT NULL,
	`expires_at` text NOT NULL,
	`last_used_at` text,
	`revoked_at` text,
	FOREIGN KEY (`account_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`lab_id`) REFERENCES `lab`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `access_token_hash` ON `access_token` (`hash`);--> statement-breakpoint
CREATE INDEX `access_token_account` ON `access_token` (`account_id`);--> statement-breakpoint
CREATE TABLE `account` (
	`id` text PRIMARY KEY NOT NULL,
	`email` text NOT NULL,
	`name` text NOT NULL,
	`password_hash` text,
	`steward` integer DEFAULT false NOT NULL,
	`session_version` integer DEFAULT 1 NOT NULL,
	`state` text DEFAULT 'active' NOT NULL,
	`created_at` text NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `account_email` ON `account` (`email`);--> statement-breakpoint
CREATE TABLE `idempotency` (
	`key` text PRIMARY KEY NOT NULL,
	`body_hash` text NOT NULL,
	`status` integer,
	`headers` text,
	`body` text,
	`created_at` text DEFAULT (strftime('%Y-%m-%dT%H:%M:%fZ')) NOT NULL
);
--> statement-breakpoint
CREATE TABLE `invitation` (
	`id` text PRIMARY KEY NOT NULL,
	`email` text NOT NULL,
	`token_hash` text NOT NULL,
	`lab_id` text,
	`role` text,
	`folio_id` text,
	`level` text,
	`grant_expires_at` text,
	`invited_by` text NOT NULL,
	`created_at` text NOT NULL,
	`expires_at` text NOT NULL,
	`accepted_at` text,
	`accepted_by` text,
	`revoked_at` text,
	FOREIGN KEY (`lab_id`) REFERENCES `lab`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`invited_by`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`accepted_by`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `invitation_token` ON `invitation` (`token_hash`);--> statement-breakpoint
CREATE INDEX `invitation_email` ON `invitation` (`email`);--> statement-breakpoint
CREATE TABLE `lab` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`place` text,
	`description` text,
	`outside_attest` integer DEFAULT false NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	`created_at` text NOT NULL
);
--> statement-breakpoint
CREATE UNIQUE INDEX `lab_name` ON `lab` (`name`);--> statement-breakpoint
CREATE TABLE `rate_limit` (
	`key` text PRIMARY KEY NOT NULL,
	`count` integer NOT NULL,
	`until` integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE `membership` (
	`account_id` text NOT NULL,
	`lab_id` text NOT NULL,
	`role` text NOT NULL,
	`created_at` text NOT NULL,
	PRIMARY KEY(`account_id`, `lab_id`),
	FOREIGN KEY (`account_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`lab_id`) REFERENCES `lab`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `membership_lab` ON `membership` (`lab_id`);--> statement-breakpoint
CREATE TABLE `registry_setting` (
	`key` text PRIMARY KEY NOT NULL,
	`value` text NOT NULL
);
--> statement-breakpoint
CREATE TABLE `centre` (
	`complex_id` text NOT NULL,
	`ordinal` integer NOT NULL,
	`element` text NOT NULL,
	`group` integer,
	`oxidation_state` real,
	`nominal` integer DEFAULT false NOT NULL,
	`alternatives` text DEFAULT '[]' NOT NULL,
	`override_reason` text,
	`d_count` real,
	`coordination_number` integer,
	`geometry` text,
	`geometry_basis` text NOT NULL,
	`spin_state` text,
	`ground_term` text,
	`ground_term_group` text,
	PRIMARY KEY(`complex_id`, `ordinal`),
	FOREIGN KEY (`complex_id`) REFERENCES `complex`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `centre_element` ON `centre` (`element`,`oxidation_state`,`complex_id`);--> statement-breakpoint
CREATE INDEX `centre_d` ON `centre` (`d_count`,`complex_id`);--> statement-breakpoint
CREATE INDEX `centre_geometry` ON `centre` (`geometry`,`complex_id`);--> statement-breakpoint
CREATE TABLE `complex_ligand` (
	`complex_id` text NOT NULL,
	`ordinal` integer NOT NULL,
	`abbreviation` text NOT NULL,
	`count` integer NOT NULL,
	`charge` integer,
	`denticity` integer NOT NULL,
	`hapticity` integer,
	`donors` text NOT NULL,
	`bridging` integer DEFAULT false NOT NULL,
	PRIMARY KEY(`complex_id`, `ordinal`),
	FOREIGN KEY (`complex_id`) REFERENCES `complex`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `complex_ligand_name` ON `complex_ligand` (`abbreviation`,`complex_id`);--> statement-breakpoint
CREATE TABLE `complex` (
	`id` text PRIMARY KEY NOT NULL,
	`number` integer NOT NULL,
	`accession` text NOT NULL,
	`identity_key` text NOT NULL,
	`formula` text NOT NULL,
	`charge` integer NOT NULL,
	`hill` text NOT NULL,
	`composition` text NOT NULL,
	`molar_mass` real NOT NULL,
	`extent` text DEFAULT 'discrete' NOT NULL,
	`descriptor` text,
	`chirality` text,
	`sites` text,
	`chelates` text,
	`point_group` text,
	`donor_set_group` text,
	`effective_group` text,
	`effective_group_reason` text,
	`lab_id` text NOT NULL,
	`maker_id` text NOT NULL,
	`state` text NOT NULL,
	`visibility` text DEFAULT 'programme' NOT NULL,
	`embargo_until` text,
	`notes` text,
	`withdrawn_reason` text,
	`merged_into` text,
	`answers` text DEFAULT '{}' NOT NULL,
	`search` text NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	`created_at` text NOT NULL,
	`updated_at` text NOT NULL,
	FOREIGN KEY (`lab_id`) REFERENCES `lab`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`maker_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `complex_number` ON `complex` (`number`);--> statement-breakpoint
CREATE UNIQUE INDEX `complex_accession` ON `complex` (`accession`);--> statement-breakpoint
CREATE UNIQUE INDEX `complex_identity_programme` ON `complex` (`identity_key`) WHERE state = 'registered' and visibility = 'programme' and merged_into is null;--> statement-breakpoint
CREATE UNIQUE INDEX `complex_identity_lab` ON `complex` (`identity_key`,`lab_id`) WHERE state = 'registered' and visibility = 'lab' and merged_into is null;--> statement-breakpoint
CREATE INDEX `complex_identity` ON `complex` (`identity_key`);--> statement-breakpoint
CREATE INDEX `complex_lab` ON `complex` (`lab_id`,`state`);--> statement-breakpoint
CREATE INDEX `complex_group` ON `complex` (`point_group`);--> statement-breakpoint
CREATE INDEX `complex_sight` ON `complex` (`merged_into`,`state`,`visibility`,`lab_id`,`maker_id`,`embargo_until`,`point_group`,`id`);--> statement-breakpoint
CREATE TABLE `ligand_site` (
	`complex_id` text NOT NULL,
	`centre_ordinal` integer NOT NULL,
	`vertex` integer NOT NULL,
	`ligand_ordinal` integer NOT NULL,
	`instance` integer NOT NULL,
	`donor` integer NOT NULL,
	PRIMARY KEY(`complex_id`, `centre_ordinal`, `vertex`),
	FOREIGN KEY (`complex_id`) REFERENCES `complex`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `merge_task` (
	`id` text PRIMARY KEY NOT NULL,
	`first_id` text NOT NULL,
	`second_id` text NOT NULL,
	`created_at` text NOT NULL,
	`settled_at` text,
	FOREIGN KEY (`first_id`) REFERENCES `complex`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`second_id`) REFERENCES `complex`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `preparation_component` (
	`preparation_id` text NOT NULL,
	`complex_id` text NOT NULL,
	`per_formula_unit` real NOT NULL,
	PRIMARY KEY(`preparation_id`, `complex_id`),
	FOREIGN KEY (`preparation_id`) REFERENCES `preparation`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`complex_id`) REFERENCES `complex`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `preparation` (
	`id` text PRIMARY KEY NOT NULL,
	`complex_id` text NOT NULL,
	`lab_id` text NOT NULL,
	`maker_id` text NOT NULL,
	`label` text NOT NULL,
	`formula` text,
	`counter_ions` text DEFAULT '[]' NOT NULL,
	`solvates` text DEFAULT '[]' NOT NULL,
	`molar_mass` real,
	`host` text,
	`form` text,
	`isotopic_label` text,
	`enantiomeric_excess` real,
	`purity` real,
	`storage` text,
	`atmosphere` text,
	`prepared_on` text,
	`notes` text,
	`visibility` text DEFAULT 'programme' NOT NULL,
	`state` text DEFAULT 'registered' NOT NULL,
	`withdrawn_reason` text,
	`version` integer DEFAULT 1 NOT NULL,
	`created_at` text NOT NULL,
	`updated_at` text NOT NULL,
	FOREIGN KEY (`complex_id`) REFERENCES `complex`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`lab_id`) REFERENCES `lab`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`maker_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `preparation_complex` ON `preparation` (`complex_id`);--> statement-breakpoint
CREATE INDEX `preparation_lab` ON `preparation` (`lab_id`);--> statement-breakpoint
CREATE TABLE `bundle` (
	`id` text PRIMARY KEY NOT NULL,
	`requested_by` text NOT NULL,
	`folio_id` text,
	`complexes` text,
	`state` text NOT NULL,
	`progress` real DEFAULT 0 NOT NULL,
	`size` integer,
	`sha256` text,
	`store_key` text,
	`error` text,
	`created_at` text NOT NULL,
	`finished_at` text,
	FOREIGN KEY (`requested_by`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`folio_id`) REFERENCES `folio`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `bundle_account` ON `bundle` (`requested_by`);--> statement-breakpoint
CREATE TABLE `edition` (
	`id` text PRIMARY KEY NOT NULL,
	`folio_id` text NOT NULL,
	`number` integer NOT NULL,
	`frozen_at` text NOT NULL,
	`frozen_by` text NOT NULL,
	`content` text NOT NULL,
	FOREIGN KEY (`folio_id`) REFERENCES `folio`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`frozen_by`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE UNIQUE INDEX `edition_number` ON `edition` (`folio_id`,`number`);--> statement-breakpoint
CREATE TABLE `folio_item` (
	`folio_id` text NOT NULL,
	`complex_id` text NOT NULL,
	`ordinal` integer NOT NULL,
	`spectra` text,
	PRIMARY KEY(`folio_id`, `complex_id`),
	FOREIGN KEY (`folio_id`) REFERENCES `folio`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`complex_id`) REFERENCES `complex`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `folio_item_complex` ON `folio_item` (`complex_id`);--> statement-breakpoint
CREATE TABLE `folio` (
	`id` text PRIMARY KEY NOT NULL,
	`name` text NOT NULL,
	`description` text,
	`lab_id` text NOT NULL,
	`maker_id` text NOT NULL,
	`licence` text NOT NULL,
	`embargo_until` text,
	`shows` text NOT NULL,
	`version` integer DEFAULT 1 NOT NULL,
	`created_at` text NOT NULL,
	`updated_at` text NOT NULL,
	FOREIGN KEY (`lab_id`) REFERENCES `lab`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`maker_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `folio_lab` ON `folio` (`lab_id`);--> statement-breakpoint
CREATE TABLE `grant` (
	`id` text PRIMARY KEY NOT NULL,
	`folio_id` text NOT NULL,
	`account_id` text NOT NULL,
	`level` text NOT NULL,
	`expires_at` text NOT NULL,
	`terms_accepted_at` text,
	`granted_by` text NOT NULL,
	`created_at` text NOT NULL,
	`revoked_at` text,
	FOREIGN KEY (`folio_id`) REFERENCES `folio`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`account_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`granted_by`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `grant_account` ON `grant` (`account_id`);--> statement-breakpoint
CREATE INDEX `grant_folio` ON `grant` (`folio_id`);--> statement-breakpoint
CREATE TABLE `band` (
	`id` text PRIMARY KEY NOT NULL,
	`spectrum_id` text NOT NULL,
	`ordinal` integer NOT NULL,
	`wavenumber` real NOT NULL,
	`height` real NOT NULL,
	`quantity` text NOT NULL,
	`epsilon` real,
	`shoulder` integer DEFAULT false NOT NULL,
	`fwhm` real,
	`oscillator_strength` real,
	`uncertainty` real,
	`found` text NOT NULL,
	`class` text DEFAULT 'unassigned' NOT NULL,
	`centre_ordinal` integer,
	`ligand` text,
	`from` text,
	`to` text,
	`reason` text,
	`state` text DEFAULT 'proposed' NOT NULL,
	`proposed_by` text NOT NULL,
	`judged_by` text,
	`judged_at` text,
	`judgement` text,
	`version` integer DEFAULT 1 NOT NULL,
	FOREIGN KEY (`spectrum_id`) REFERENCES `spectrum`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`proposed_by`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`judged_by`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `band_spectrum` ON `band` (`spectrum_id`);--> statement-breakpoint
CREATE INDEX `band_place` ON `band` (`wavenumber`);--> statement-breakpoint
CREATE TABLE `file` (
	`sha256` text PRIMARY KEY NOT NULL,
	`size` integer NOT NULL,
	`created_at` text NOT NULL
);
--> statement-breakpoint
CREATE TABLE `instrument` (
	`id` text PRIMARY KEY NOT NULL,
	`lab_id` text NOT NULL,
	`name` text NOT NULL,
	`model` text,
	`absorbance_limit` real,
	`notes` text,
	`version` integer DEFAULT 1 NOT NULL,
	`created_at` text NOT NULL,
	FOREIGN KEY (`lab_id`) REFERENCES `lab`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `instrument_lab` ON `instrument` (`lab_id`);--> statement-breakpoint
CREATE TABLE `spectrum` (
	`id` text PRIMARY KEY NOT NULL,
	`complex_id` text NOT NULL,
	`preparation_id` text,
	`lab_id` text NOT NULL,
	`maker_id` text NOT NULL,
	`title` text NOT NULL,
	`technique` text NOT NULL,
	`phase` text,
	`p_h` real,
	`ionic_strength` real,
	`electrolyte` text,
	`atmosphere` text,
	`age` text,
	`concentration` real,
	`concentration_uncertainty` real,
	`weighing` text,
	`path_length` real,
	`path_length_uncertainty` real,
	`temperature` real,
	`bandwidth` real,
	`cell` text,
	`polarisation` text,
	`blank_sha256` text,
	`instrument_id` text,
	`operator` text,
	`measured_at` text,
	`synthetic` integer DEFAULT false NOT NULL,
	`file_sha256` text NOT NULL,
	`file_name` text NOT NULL,
	`block` integer DEFAULT 0 NOT NULL,
	`column` integer DEFAULT 0 NOT NULL,
	`reading` text DEFAULT '{}' NOT NULL,
	`x_unit` text NOT NULL,
	`y_unit` text NOT NULL,
	`points` integer NOT NULL,
	`x_min` real NOT NULL,
	`x_max` real NOT NULL,
	`colour` text,
	`warnings` text DEFAULT '[]' NOT NULL,
	`flags` text DEFAULT '[]' NOT NULL,
	`history` text DEFAULT '[]' NOT NULL,
	`visibility` text DEFAULT 'programme' NOT NULL,
	`state` text DEFAULT 'registered' NOT NULL,
	`withdrawn_reason` text,
	`notes` text,
	`version` integer DEFAULT 1 NOT NULL,
	`created_at` text NOT NULL,
	`updated_at` text NOT NULL,
	FOREIGN KEY (`complex_id`) REFERENCES `complex`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`preparation_id`) REFERENCES `preparation`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`lab_id`) REFERENCES `lab`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`maker_id`) REFERENCES `account`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`blank_sha256`) REFERENCES `file`(`sha256`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`instrument_id`) REFERENCES `instrument`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`file_sha256`) REFERENCES `file`(`sha256`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `spectrum_complex` ON `spectrum` (`complex_id`,`state`);--> statement-breakpoint
CREATE INDEX `spectrum_lab` ON `spectrum` (`lab_id`);--> statement-breakpoint
CREATE INDEX `spectrum_file` ON `spectrum` (`file_sha256`,`block`,`column`);--> statement-breakpoint
CREATE INDEX `spectrum_preparation` ON `spectrum` (`preparation_id`);--> statement-breakpoint
CREATE TABLE `spectrum_points` (
	`spectrum_id` text PRIMARY KEY NOT NULL,
	`x` blob NOT NULL,
	`y` blob NOT NULL,
	`wavenumber` blob NOT NULL,
	`value` blob NOT NULL,
	FOREIGN KEY (`spectrum_id`) REFERENCES `spectrum`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `spectrum_solvent` (
	`spectrum_id` text NOT NULL,
	`ordinal` integer NOT NULL,
	`name` text NOT NULL,
	`volume_fraction` real NOT NULL,
	PRIMARY KEY(`spectrum_id`, `ordinal`),
	FOREIGN KEY (`spectrum_id`) REFERENCES `spectrum`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE INDEX `spectrum_solvent_name` ON `spectrum_solvent` (`name`);--> statement-breakpoint
CREATE TABLE `spectrum_species` (
	`spectrum_id` text NOT NULL,
	`complex_id` text NOT NULL,
	`fraction` real,
	`basis` text NOT NULL,
	PRIMARY KEY(`spectrum_id`, `complex_id`),
	FOREIGN KEY (`spectrum_id`) REFERENCES `spectrum`(`id`) ON UPDATE no action ON DELETE no action,
	FOREIGN KEY (`complex_id`) REFERENCES `complex`(`id`) ON UPDATE no action ON DELETE no action
);
--> statement-breakpoint
CREATE TABLE `job` (
	`id` text PRIMARY KEY NOT NULL,
	`kind` text NOT NULL,
	`payload` text NOT NULL,
	`state` text NOT NULL,
	`tries` integer DEFAULT 0 NOT NULL,
	`run_at` integer NOT NULL,
	`lease_until` integer,
	`progress` real DEFAULT 0 NOT NULL,
	`error` text,
	`created_at` text NOT NULL,
	`finished_at` text
);
--> statement-breakpoint
CREATE INDEX `job_due` ON `job` (`state`,`run_at`);--> statement-breakpoint
CREATE TABLE `mail` (
	`id` text PRIMARY KEY NOT NULL,
	`key` text NOT NULL,
	`kind` text NOT NULL,
	`to` text NOT NULL,
	`subject` text NOT NULL,
	`text` text NOT NULL,
	`html` text NOT NULL,
	`state` text NOT NULL,
	`tries` integer DEFAULT 0 NOT NULL,
	`next_at` integer NOT NULL,
	`error` text,
	`created_at` text NOT NULL,
	`sent_at` text
);
--> statement-breakpoint
CREATE UNIQUE INDEX `mail_key` ON `mail` (`key`);--> statement-breakpoint
CREATE INDEX `mail_due` ON `mail` (`state`,`next_at`);--> statement-breakpoint
CREATE TABLE `trail` (
	`seq` integer PRIMARY KEY AUTOINCREMENT NOT NULL,
	`at` text NOT NULL,
	`actor_id` text,
	`token_id` text,
	`action` text NOT NULL,
	`subject_type` text NOT NULL,
	`subject_id` text NOT NULL,
	`detail` text NOT NULL,
	`previous_hash` text NOT NULL,
	`hash` text NOT NULL
);
--> statement-breakpoint
CREATE INDEX `trail_subject` ON `trail` (`subject_type`,`subject_id`);--> statement-breakpoint
CREATE INDEX `trail_actor` ON `trail` (`actor_id`);