export { sequelize } from './connection.ts';
export { withTransaction, mayRunAgain } from './transaction.ts';
export { migrate, migrator, schemaVersion } from './migrate.ts';
export { Person } from './models/person.ts';
export { Session } from './models/session.ts';
export { Token, type TokenPurpose } from './models/token.ts';
export { School } from './models/school.ts';
export { Membership, ROLES, type Role } from './models/membership.ts';
export { Group, GroupPerson } from './models/group.ts';
