import { describe, expect, test } from "vitest";
import {
  parseBackupArguments,
  parseBenchArguments,
  parseClusterArguments,
  parseStartArguments,
  parseTestArguments,
} from "@/scripts/lib/arguments.mjs";
import { PlainError } from "@/scripts/lib/plain-error.mjs";

const plain = { help: false, port: 3000, dataFolder: "/home/eva/saddlemark/.data", demonstration: true, development: false };

describe("npm start", () => {
  test.each([
    { words: [], expected: plain },
    { words: ["--port", "8080"], expected: { ...plain, port: 8080 } },
    { words: ["--port=65535"], expected: { ...plain, port: 65535 } },
    { words: ["--data", "/srv/x"], expected: { ...plain, dataFolder: "/srv/x" } },
    { words: ["--data", "../x"], expected: { ...plain, dataFolder: "/home/eva/x" } },
    { words: ["--no-demo"], expected: { ...plain, demonstration: false } },
    { words: ["--dev"], expected: { ...plain, development: true } },
    { words: ["--help"], expected: { ...plain, help: true } },
  ])("understands $words", ({ words, expected }) => {
    expect(parseStartArguments(words, "/home/eva/saddlemark")).toEqual(expected);
  });

  test.each([["--port", "0"], ["--port", "65536"], ["--port", "80a"], ["--port", ""], ["--port"], ["--prot", "80"], ["x"], ["--data", ""], ["--data="]])(
    "refuses %s %s in one plain line",
    (...words) => {
      const refuse = () => parseStartArguments(words, "/");
      expect(refuse).toThrow(PlainError);
      expect(refuse).toThrow(/^[^\n]+$/);
    },
  );
});

test("npm test runs every part unless one is named", () => {
  expect(parseTestArguments([]).parts).toEqual(["unit", "database", "browser"]);
  expect(parseTestArguments(["--only", "browser"]).parts).toEqual(["browser"]);
  expect(() => parseTestArguments(["--only", "fast"])).toThrow('--only takes unit, database, browser; "fast" is none of them.');
});

test("npm run backup needs exactly one file", () => {
  expect(parseBackupArguments(["a.dump"], "/srv")).toEqual({ file: "/srv/a.dump", dataFolder: "/srv/.data" });
  expect(() => parseBackupArguments([], "/srv")).toThrow(PlainError);
  expect(() => parseBackupArguments(["a", "b"], "/srv")).toThrow(PlainError);
});

test("cluster.mjs knows up and down only", () => {
  expect(parseClusterArguments(["up", "--data", "d"], "/srv")).toEqual({ verb: "up", dataFolder: "/srv/d" });
  expect(() => parseClusterArguments(["drop"], "/srv")).toThrow(PlainError);
  expect(() => parseClusterArguments([], "/srv")).toThrow(PlainError);
});

test("npm run bench runs the named benches, or all", () => {
  expect(parseBenchArguments([], ["advice", "logs"])).toEqual(["advice", "logs"]);
  expect(parseBenchArguments(["--logs"], ["advice", "logs"])).toEqual(["logs"]);
  expect(() => parseBenchArguments(["--replay"], ["advice", "logs"])).toThrow('There is no bench "--replay"; there are --advice, --logs.');
  expect(() => parseBenchArguments(["logs"], ["advice", "logs"])).toThrow(PlainError);
});
