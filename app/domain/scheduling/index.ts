export { type WeekCalendar, weekCalendarSchema } from "./calendar";
