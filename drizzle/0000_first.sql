CREATE TABLE `refusal_count` (
	`reason` enum('not JSON','over 8 KB','field missing or of the wrong type','number not finite','negative magnitude','magnitude over 100 times the rating','unknown topic','unknown line','unknown terminal','instant ahead of time','instant older than the raw store') NOT NULL,
	`count` bigint NOT NULL,
	`last_at` datetime(3) NOT NULL,
	CONSTRAINT `refusal_count_reason_pk` PRIMARY KEY(`reason`)
);
--> statement-breakpoint
CREATE TABLE `refused_message` (
	`id` bigint AUTO_INCREMENT NOT NULL,
	`at` datetime(3) NOT NULL,
	`topic` varchar(255) NOT NULL,
	`reason` enum('not JSON','over 8 KB','field missing or of the wrong type','number not finite','negative magnitude','magnitude over 100 times the rating','unknown topic','unknown line','unknown terminal','instant ahead of time','instant older than the raw store') NOT NULL,
	`detail` varchar(500) NOT NULL,
	`payload` varbinary(2048) NOT NULL,
	CONSTRAINT `refused_message_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `terminal_state` (
	`terminal_id` int NOT NULL,
	`presence` enum('online','offline'),
	`last_at` datetime(3),
	`heard_at` datetime(3),
	`last_seq` bigint,
	`gap_count` int NOT NULL,
	`missed_count` int NOT NULL,
	CONSTRAINT `terminal_state_terminal_id` PRIMARY KEY(`terminal_id`)
);
--> statement-breakpoint
CREATE TABLE `creep_verdict` (
	`line_id` int NOT NULL,
	`phase` enum('a','b','c') NOT NULL,
	`computed_at` datetime(3) NOT NULL,
	`creep` json NOT NULL,
	CONSTRAINT `creep_verdict_line_id_phase_pk` PRIMARY KEY(`line_id`,`phase`)
);
--> statement-breakpoint
CREATE TABLE `day_level` (
	`line_id` int NOT NULL,
	`phase` enum('a','b','c') NOT NULL,
	`start` datetime(3) NOT NULL,
	`least_amps` double,
	`p05_amps` double,
	`median_amps` double,
	`p95_amps` double,
	`greatest_amps` double,
	`mean_restraint_amps` double,
	`mean_through_amps` double,
	`greatest_utilisation` double,
	`qualified_count` int NOT NULL,
	`all_count` int NOT NULL,
	CONSTRAINT `day_level_line_id_phase_start_pk` PRIMARY KEY(`line_id`,`phase`,`start`)
);
--> statement-breakpoint
CREATE TABLE `hour_level` (
	`line_id` int NOT NULL,
	`phase` enum('a','b','c') NOT NULL,
	`start` datetime(3) NOT NULL,
	`least_amps` double,
	`p05_amps` double,
	`median_amps` double,
	`p95_amps` double,
	`greatest_amps` double,
	`mean_restraint_amps` double,
	`mean_through_amps` double,
	`greatest_utilisation` double,
	`qualified_count` int NOT NULL,
	`all_count` int NOT NULL,
	CONSTRAINT `hour_level_line_id_phase_start_pk` PRIMARY KEY(`line_id`,`phase`,`start`)
);
--> statement-breakpoint
CREATE TABLE `stale_hour` (
	`line_id` int NOT NULL,
	`start` datetime(3) NOT NULL,
	CONSTRAINT `stale_hour_line_id_start_pk` PRIMARY KEY(`line_id`,`start`)
);
--> statement-breakpoint
CREATE TABLE `audit_entry` (
	`id` bigint AUTO_INCREMENT NOT NULL,
	`at` datetime(3) NOT NULL,
	`user_id` varchar(40),
	`user_name` varchar(80) NOT NULL,
	`action` varchar(60) NOT NULL,
	`subject` varchar(120) NOT NULL,
	`detail` json NOT NULL,
	CONSTRAINT `audit_entry_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `one_time_link` (
	`token_hash` varchar(64) NOT NULL,
	`user_id` varchar(40) NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	`used_at` datetime(3),
	CONSTRAINT `one_time_link_token_hash` PRIMARY KEY(`token_hash`)
);
--> statement-breakpoint
CREATE TABLE `session` (
	`id` varchar(255) NOT NULL,
	`user_id` varchar(40) NOT NULL,
	`expires_at` datetime(3) NOT NULL,
	CONSTRAINT `session_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `sign_in_attempt` (
	`id` bigint AUTO_INCREMENT NOT NULL,
	`at` datetime(3) NOT NULL,
	`email` varchar(254) NOT NULL,
	`address` varchar(64) NOT NULL,
	`succeeded` boolean NOT NULL,
	CONSTRAINT `sign_in_attempt_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `user` (
	`id` varchar(40) NOT NULL,
	`email` varchar(254) NOT NULL,
	`name` varchar(80) NOT NULL,
	`role` enum('operator','engineer','planner','admin') NOT NULL,
	`password_hash` varchar(255),
	`created_at` datetime(3) NOT NULL,
	CONSTRAINT `user_id` PRIMARY KEY(`id`),
	CONSTRAINT `user_email_unique` UNIQUE(`email`)
);
--> statement-breakpoint
CREATE TABLE `line` (
	`id` int AUTO_INCREMENT NOT NULL,
	`key` varchar(40) NOT NULL,
	`name` varchar(80) NOT NULL,
	`voltage_kv` double NOT NULL,
	`rating_amps` double NOT NULL,
	`emergency_rating_amps` double NOT NULL,
	`length_km` double NOT NULL,
	`kind` enum('overhead','cable','mixed') NOT NULL,
	`capacitance_nf_per_km` double,
	`goes_by` enum('phasors','reported') NOT NULL,
	`in_service` boolean NOT NULL,
	`series_compensated` boolean NOT NULL,
	`in_zone_transformer` json,
	CONSTRAINT `line_id` PRIMARY KEY(`id`),
	CONSTRAINT `line_key_unique` UNIQUE(`key`)
);
--> statement-breakpoint
CREATE TABLE `register_revision` (
	`id` int NOT NULL,
	`revision` int NOT NULL,
	CONSTRAINT `register_revision_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `setting_record` (
	`id` int AUTO_INCREMENT NOT NULL,
	`line_id` int NOT NULL,
	`valid_from` datetime(3) NOT NULL,
	`characteristic` json NOT NULL,
	`restraint` json NOT NULL,
	`note` varchar(500) NOT NULL,
	`recorded_by` varchar(80) NOT NULL,
	`recorded_at` datetime(3) NOT NULL,
	CONSTRAINT `setting_record_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `substation` (
	`key` varchar(40) NOT NULL,
	`name` varchar(80) NOT NULL,
	CONSTRAINT `substation_key` PRIMARY KEY(`key`)
);
--> statement-breakpoint
CREATE TABLE `terminal` (
	`id` int AUTO_INCREMENT NOT NULL,
	`line_id` int NOT NULL,
	`key` varchar(40) NOT NULL,
	`position` int NOT NULL,
	`substation` varchar(40) NOT NULL,
	`ct_primary_amps` double NOT NULL,
	`ct_class` varchar(20) NOT NULL,
	`in_service` boolean NOT NULL,
	CONSTRAINT `terminal_id` PRIMARY KEY(`id`),
	CONSTRAINT `terminal_line_key` UNIQUE(`line_id`,`key`)
);
--> statement-breakpoint
CREATE TABLE `snapshot` (
	`line_id` int NOT NULL,
	`at` datetime(3) NOT NULL,
	`flags` smallint NOT NULL,
	`differential_a_amps` double,
	`differential_b_amps` double,
	`differential_c_amps` double,
	`restraint_a_amps` double,
	`restraint_b_amps` double,
	`restraint_c_amps` double,
	`threshold_a_amps` double,
	`threshold_b_amps` double,
	`threshold_c_amps` double,
	`utilisation_a` double,
	`utilisation_b` double,
	`utilisation_c` double,
	`through_amps` double,
	`setting_record_id` int,
	`phasors` varbinary(4096) NOT NULL,
	CONSTRAINT `snapshot_line_id_at_pk` PRIMARY KEY(`line_id`,`at`)
);
--> statement-breakpoint
CREATE TABLE `warning` (
	`id` int AUTO_INCREMENT NOT NULL,
	`line_id` int NOT NULL,
	`kind` enum('over','near','rising','blind') NOT NULL,
	`cause` json NOT NULL,
	`opened_at` datetime(3) NOT NULL,
	`returned_at` datetime(3),
	`acknowledged_at` datetime(3),
	`acknowledged_by` varchar(80),
	`note` varchar(1000),
	`changed_at` datetime(3) NOT NULL,
	CONSTRAINT `warning_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
ALTER TABLE `terminal_state` ADD CONSTRAINT `terminal_state_terminal_id_terminal_id_fk` FOREIGN KEY (`terminal_id`) REFERENCES `terminal`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `one_time_link` ADD CONSTRAINT `one_time_link_user_id_user_id_fk` FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `session` ADD CONSTRAINT `session_user_id_user_id_fk` FOREIGN KEY (`user_id`) REFERENCES `user`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `setting_record` ADD CONSTRAINT `setting_record_line_id_line_id_fk` FOREIGN KEY (`line_id`) REFERENCES `line`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `terminal` ADD CONSTRAINT `terminal_line_id_line_id_fk` FOREIGN KEY (`line_id`) REFERENCES `line`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `terminal` ADD CONSTRAINT `terminal_substation_substation_key_fk` FOREIGN KEY (`substation`) REFERENCES `substation`(`key`) ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `warning` ADD CONSTRAINT `warning_line_id_line_id_fk` FOREIGN KEY (`line_id`) REFERENCES `line`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `refused_message_at` ON `refused_message` (`at`);--> statement-breakpoint
CREATE INDEX `audit_entry_at` ON `audit_entry` (`at`);--> statement-breakpoint
CREATE INDEX `sign_in_attempt_email_at` ON `sign_in_attempt` (`email`,`at`);--> statement-breakpoint
CREATE INDEX `sign_in_attempt_address_at` ON `sign_in_attempt` (`address`,`at`);--> statement-breakpoint
CREATE INDEX `setting_record_line_from` ON `setting_record` (`line_id`,`valid_from`);--> statement-breakpoint
CREATE INDEX `warning_line_opened` ON `warning` (`line_id`,`opened_at`);--> statement-breakpoint
CREATE INDEX `warning_changed` ON `warning` (`changed_at`);