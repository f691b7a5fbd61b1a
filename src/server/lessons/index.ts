export { listLessons, readLesson, readLessonById, type StoredLesson } from './read.ts';
export {
  LessonFaults,
  publishCompiled,
  publishLesson,
  publishShippedCourse,
  type Published,
} from './publish.ts';
