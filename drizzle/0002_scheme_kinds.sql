CREATE TABLE `setting_proposal` (
	`id` int AUTO_INCREMENT NOT NULL,
	`line_id` int NOT NULL,
	`recorded` json,
	`summary` json NOT NULL,
	`note` varchar(500) NOT NULL,
	`kept_by` varchar(80) NOT NULL,
	`kept_at` datetime(3) NOT NULL,
	CONSTRAINT `setting_proposal_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
ALTER TABLE `line` ADD `least_internal_fault_amps` double;--> statement-breakpoint
ALTER TABLE `setting_record` ADD `charging_compensation` boolean DEFAULT false NOT NULL;--> statement-breakpoint
ALTER TABLE `setting_proposal` ADD CONSTRAINT `setting_proposal_line_id_line_id_fk` FOREIGN KEY (`line_id`) REFERENCES `line`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `setting_proposal_line_kept` ON `setting_proposal` (`line_id`,`kept_at`);