CREATE TABLE `recorded_work` (
	`id` int AUTO_INCREMENT NOT NULL,
	`line_id` int NOT NULL,
	`terminal` varchar(40),
	`done_on` date NOT NULL,
	`what` varchar(500) NOT NULL,
	`follow_up_id` int,
	`recorded_by` varchar(80) NOT NULL,
	`recorded_at` datetime(3) NOT NULL,
	`withdrawn_by` varchar(80),
	`withdrawn_at` datetime(3),
	CONSTRAINT `recorded_work_id` PRIMARY KEY(`id`)
);
--> statement-breakpoint
ALTER TABLE `line` ADD `owner` varchar(80);--> statement-breakpoint
ALTER TABLE `recorded_work` ADD CONSTRAINT `recorded_work_line_id_line_id_fk` FOREIGN KEY (`line_id`) REFERENCES `line`(`id`) ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE `recorded_work` ADD CONSTRAINT `recorded_work_follow_up_id_follow_up_id_fk` FOREIGN KEY (`follow_up_id`) REFERENCES `follow_up`(`id`) ON DELETE set null ON UPDATE no action;--> statement-breakpoint
CREATE INDEX `recorded_work_line` ON `recorded_work` (`line_id`,`done_on`);