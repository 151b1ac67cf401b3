export { type ReadStudyOptions, readStudy } from "./tables/read-study.ts";
