import { Op } from 'sequelize';

/** For rows that hold from a day until, but not on, another one; open rows hold for ever. */
export function inForceOn(day: string) {
	return {
		fromDay: { [Op.lte]: day },
		untilDay: { [Op.or]: [{ [Op.is]: null }, { [Op.gt]: day }] }
	};
}
