CREATE TABLE `import_batch` (
	`id` int AUTO_INCREMENT NOT NULL,
	`imported_at` datetime(3) NOT NULL,
	`imported_by` varchar(80) NOT NULL,
	`kind` enum('lines','terminals','settings') NOT NULL,
	`file_name` varchar(120) NOT NULL,
	`added_count` int NOT NULL,
	`changed_count` int NOT NULL,
	`left_count` int NOT NULL,
	CONSTRAINT `import_batch_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `minute_level` (
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
	`disqualified` json,
	`sums` varbinary(1024),
	CONSTRAINT `minute_level_line_id_phase_start_pk` PRIMARY KEY(`line_id`,`phase`,`start`)
);
--> statement-breakpoint
ALTER TABLE `day_level` ADD `disqualified` json;--> statement-breakpoint
ALTER TABLE `day_level` ADD `sums` varbinary(1024);--> statement-breakpoint
ALTER TABLE `hour_level` ADD `disqualified` json;--> statement-breakpoint
ALTER TABLE `hour_level` ADD `sums` varbinary(1024);--> statement-breakpoint
CREATE INDEX `import_batch_imported_at` ON `import_batch` (`imported_at`);