/** Days, shifts and promise dates in the shop's zone. */
export { type WeekCalendar, weekCalendarSchema } from "./calendar";
export { byDueDate, maxLateness } from "./due-dates";
export { type Day, dayOf, instantAt, localTime } from "./local-time";
export { type Promised, type PromiseRequest, type PromiseResult, promiseDate } from "./promise";
export { type CutRun, type MinutesFigures, minutesByMachine, onTimeShare } from "./shop-figures";
export { addDays, addWorkingDays, isWorkingDay, shownDay, weekdayOf, workingDayFrom } from "./working-days";
export { finishOf, minutesOn, shiftsOn } from "./working-time";
