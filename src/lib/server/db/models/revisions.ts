import { DataTypes, Model } from 'sequelize';
import type { InferAttributes, InferCreationAttributes, NonAttribute, Sequelize } from 'sequelize';
import { appendOnly, id } from './columns';
import type { Person } from './people';

export class Revision extends Model<InferAttributes<Revision>, InferCreationAttributes<Revision>> {
	declare id: string;
	declare shopId: string;
	declare buildId: string;
	declare number: number;
	declare parentNumber: number | null;
	declare note: string;
	/** Canonical JSON, the bytes under `hash`. */
	declare document: string;
	declare hash: string;
	declare requestId: string;
	declare createdAt: Date;
	declare createdBy: string;
	declare author?: NonAttribute<Person>;
	declare release?: NonAttribute<Release | null>;
}

export class Release extends Model<InferAttributes<Release>, InferCreationAttributes<Release>> {
	declare id: string;
	declare shopId: string;
	declare buildId: string;
	declare revisionId: string;
	/** JSON: the figures at ride height of both sides as computed by `kernelVersion`. */
	declare figures: string;
	declare kernelVersion: string;
	declare releasedAt: Date;
	declare releasedBy: string;
	declare author?: NonAttribute<Person>;
}

export class AlignmentRow extends Model<InferAttributes<AlignmentRow>, InferCreationAttributes<AlignmentRow>> {
	declare id: string;
	declare shopId: string;
	declare buildId: string;
	declare revisionId: string;
	declare revisionHash: string;
	declare kind: 'asFound' | 'asSet';
	/** JSON of the measurements. */
	declare entry: string;
	declare requestId: string;
	declare createdAt: Date;
	declare createdBy: string;
	declare author?: NonAttribute<Person>;
}

export class AuditEntry extends Model<InferAttributes<AuditEntry>, InferCreationAttributes<AuditEntry>> {
	declare id: string;
	declare shopId: string | null;
	declare personId: string | null;
	declare act: string;
	declare buildId: string | null;
	declare detail: string;
	declare requestId: string;
	declare createdAt: Date;
}

export function defineRevisions(sequelize: Sequelize): void {
	// Fresh objects each: Sequelize writes the column's name into the definition it is given.
	const hash = () => ({ type: DataTypes.CHAR(64), allowNull: false });
	const moment = () => ({ type: DataTypes.DATE(3), allowNull: false });
	const json = () => ({ type: DataTypes.TEXT('long'), allowNull: false });
	Revision.init(
		{
			id: id(true),
			shopId: id(),
			buildId: id(),
			number: { type: DataTypes.INTEGER, allowNull: false },
			parentNumber: { type: DataTypes.INTEGER, allowNull: true },
			note: { type: DataTypes.STRING(500), allowNull: false },
			document: json(),
			hash: hash(),
			requestId: id(),
			createdAt: moment(),
			createdBy: id()
		},
		{ sequelize, tableName: 'revisions' }
	);
	Release.init(
		{
			id: id(true),
			shopId: id(),
			buildId: id(),
			revisionId: id(),
			figures: json(),
			kernelVersion: { type: DataTypes.STRING(40), allowNull: false },
			releasedAt: moment(),
			releasedBy: id()
		},
		{ sequelize, tableName: 'releases' }
	);
	AlignmentRow.init(
		{
			id: id(true),
			shopId: id(),
			buildId: id(),
			revisionId: id(),
			revisionHash: hash(),
			kind: { type: DataTypes.STRING(8), allowNull: false },
			entry: json(),
			requestId: id(),
			createdAt: moment(),
			createdBy: id()
		},
		{ sequelize, tableName: 'alignment_records' }
	);
	AuditEntry.init(
		{
			id: id(true),
			shopId: { type: DataTypes.CHAR(36), allowNull: true },
			personId: { type: DataTypes.CHAR(36), allowNull: true },
			act: { type: DataTypes.STRING(40), allowNull: false },
			buildId: { type: DataTypes.CHAR(36), allowNull: true },
			detail: { type: DataTypes.STRING(200), allowNull: false },
			requestId: { type: DataTypes.STRING(36), allowNull: false },
			createdAt: moment()
		},
		{ sequelize, tableName: 'audit_entries' }
	);
	appendOnly(Revision, Release, AlignmentRow, AuditEntry);
}
