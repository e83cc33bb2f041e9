CREATE TABLE `follow_up` (
	`id` int AUTO_INCREMENT NOT NULL,
	`line_id` int NOT NULL,
	`phase` enum('a','b','c'),
	`cause` enum('charging','ratio mismatch','angle mismatch','rest','not told') NOT NULL,
	`due` date,
	`note` varchar(1000) NOT NULL,
	`opened_by` varchar(80) NOT NULL,
	`opened_at` datetime(3) NOT NULL,
	`done_at` datetime(3),
	CONSTRAINT `follow_up_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
CREATE TABLE `standing_verdict` (
	`line_id` int NOT NULL,
	`phase` enum('a','b','c') NOT NULL,
	`computed_at` datetime(3) NOT NULL,
	`level_amps` double,
	`share_of_pickup` double,
	`utilisation_p95` double,
	`emergency_utilisation` double,
	`charging_amps` double,
	`mismatch_amps` double,
	`rest_amps` double,
	`creep_amps_per_month` double,
	`creep_verdict` enum('creep','within margin'),
	`near_earliest` date,
	`near_likely` date,
	`likely_cause` enum('charging','ratio mismatch','angle mismatch','rest','not told') NOT NULL,
	`verdict` json NOT NULL,
	CONSTRAINT `standing_verdict_line_id_phase_pk` PRIMARY KEY(`line_id`,`phase`)
);
--> statement-breakpoint
ALTER TABLE `follow_up` ADD CONSTRAINT `follow_up_line_id_line_id_fk` FOREIGN KEY (`line_id`) REFERENCES `line`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `follow_up_line` ON `follow_up` (`line_id`,`opened_at`);--> statement-breakpoint
CREATE INDEX `standing_verdict_share` ON `standing_verdict` (`share_of_pickup`);--> statement-breakpoint
CREATE INDEX `standing_verdict_near` ON `standing_verdict` (`near_likely`);