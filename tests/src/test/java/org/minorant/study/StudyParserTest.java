package org.minorant.study;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.study.StudyFile.ChannelLine;
import org.minorant.study.StudyFile.EnsembleLine;
import org.minorant.study.StudyFile.PairLine;
import org.minorant.study.StudyFile.Repair;
import org.minorant.study.StudyFile.StateLine;

class StudyParserTest {

    private static final String TWO_STATES = "state a a.mtx\nstate b b.npy\n";

    @TempDir
    Path directory;

    private Path file(String text) throws IOException {
        return Files.writeString(directory.resolve("x.study"), text);
    }

    private StudyFile parse(String text) throws IOException {
        return StudyParser.parse(file(text));
    }

    /** The message without the file's name in front. */
    private String refusal(String text) throws IOException {
        Path file = file(text);
        String message = assertThrows(BadInputException.class, () -> StudyParser.parse(file))
                .getMessage();
        assertEquals(List.of(message), message.lines().toList());
        assertEquals(file.toString(), message.substring(0, file.toString().length()));
        return message.substring(file.toString().length());
    }

    @Test
    void everyStatementIsRead() throws IOException {
        StudyFile s = parse(String.join(
                "\n",
                "# a comment",
                "",
                "title  Lamp signals,  two spaces kept",
                "state a sub dir/a 1.mtx   # file names may hold spaces",
                "nearest\tb\tb#1.npy",
                "pair p a b prior 0.25",
                "ensemble e a:0.5 b:0.25 a:0.25",
                "channel c a b a",
                "errors 1e-3 0.25",
                "messages 2 1000000000000",
                "output ../out dir",
                "copies p 1 10 1000000",
                "uses c error 1e-3 1 50 1000000"));
        assertEquals("Lamp signals,  two spaces kept", s.title());
        assertEquals(
                List.of(
                        new StateLine(4, "a", directory.resolve("sub dir/a 1.mtx"), Repair.NONE),
                        new StateLine(5, "b", directory.resolve("b#1.npy"), Repair.NEAREST)),
                s.states());
        assertEquals(List.of(new PairLine(6, "p", "a", "b", 0.25)), s.pairs());
        assertEquals(List.of(new StudyFile.CopiesLine(12, "p", List.of(1, 10, 1_000_000))), s.copies());
        assertEquals(
                List.of(new EnsembleLine(7, "e", List.of("a", "b", "a"), List.of(0.5, 0.25, 0.25))), s.ensembles());
        assertEquals(List.of(new ChannelLine(8, "c", List.of("a", "b", "a"))), s.channels());
        assertEquals(List.of(new StudyFile.UsesLine(13, "c", 0.001, List.of(1, 50, 1_000_000))), s.uses());
        assertEquals(List.of(0.001, 0.25), s.errors());
        assertEquals(List.of(2L, 1_000_000_000_000L), s.messages());
        assertEquals(directory.getParent().resolve("out dir"), s.output());
    }

    @Test
    void whatIsNotGivenHasItsDefault() throws IOException {
        StudyFile s = parse(TWO_STATES + "pair p a b prior 0.5");
        assertEquals("x.study", s.title());
        assertEquals(List.of(0.001, 0.01, 0.1), s.errors());
        assertEquals(List.of(2L, 4L, 8L), s.messages());
        assertEquals(directory.resolve("x-results"), s.output());
    }

    @ParameterizedTest
    @ValueSource(strings = {"\n", "\r\n", "\r"})
    void anyLineEndsAreRead(String end) throws IOException {
        StudyFile s = parse((TWO_STATES + "pair p a b prior 0.5\n").replace("\n", end));
        assertEquals(directory.resolve("b.npy"), s.states().get(1).file());
        assertEquals(3, s.pairs().get(0).line());
    }

    @Test
    void aByteOrderMarkIsSkipped() throws IOException {
        StudyFile s = parse("\uFEFFtitle T\u00fcrme\n" + TWO_STATES + "channel c a b");
        assertEquals("T\u00fcrme", s.title());
    }

    @Test
    void anEnsembleWithoutPriorsHasEqualOnes() throws IOException {
        assertEquals(
                List.of(1.0 / 3, 1.0 / 3, 1.0 / 3),
                parse(TWO_STATES + "ensemble e a b a").ensembles().get(0).priors());
    }

    @Test
    void copiesOfAPairAreAskedForOnce() throws IOException {
        assertEquals(
                ":5: copies of p were already asked for in line 4; give all numbers in one line",
                refusal(TWO_STATES + "pair p a b prior 0.5\ncopies p 2\ncopies p 3"));
    }

    @Test
    void usesOfAChannelAreAskedForOnce() throws IOException {
        assertEquals(
                ":5: uses of c were already asked for in line 4; give all numbers in one line",
                refusal(TWO_STATES + "channel c a b\nuses c error 0.1 2\nuses c error 0.1 3"));
        assertEquals(":4: the line ends where 'error' should stand", refusal(TWO_STATES + "channel c a b\nuses c"));
        assertEquals(
                ":4: '1' is not an error level; give a number above 0 and below 1",
                refusal(TWO_STATES + "channel c a b\nuses c error 1 5"));
        assertEquals(
                ":4: the line ends where a number of uses should stand",
                refusal(TWO_STATES + "channel c a b\nuses c error 0.1"));
        assertEquals(
                ":4: '0' is not a number of uses; give a whole number from 1 to 1000000",
                refusal(TWO_STATES + "channel c a b\nuses c error 0.1 0"));
    }

    @Test
    void absolutePathsStay() throws IOException {
        Path absolute = directory.resolve("elsewhere").resolve("a.mtx");
        assertEquals(
                absolute,
                parse("state a " + absolute + "\nstate b b.npy\nchannel c a b")
                        .states()
                        .get(0)
                        .file());
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            quoteCharacter = '`',
            value = {
                "stat a a.mtx | unknown word 'stat'; a line begins with one of title, state, nearest, pair, copies, ensemble, channel, uses, errors,"
                        + " messages, output",
                "STATE c c.mtx | unknown word 'STATE'; a line begins with one of title, state, nearest, pair, copies, ensemble, channel, uses, errors,"
                        + " messages, output",
                "title | the line ends where a title should stand",
                "state | the line ends where a name should stand",
                "state c | the line ends where a file should stand",
                "state c! c.mtx | 'c!' is not a name; use up to 40 letters, digits, '-' and '_', beginning with a letter or digit",
                "state ../c c.mtx | '../c' is not a name; use up to 40 letters, digits, '-' and '_', beginning with a letter or digit",
                "state A c.mtx | the name 'A' was already given in line 1 (upper and lower case count as the same); choose another",
                "pair | the line ends where a name should stand",
                "pair p | the line ends where the first state should stand",
                "pair p a | the line ends where the second state should stand",
                "pair p a b | the line ends where 'prior' should stand",
                "pair p a b 0.5 | found '0.5' where 'prior' should stand",
                "pair p a b prior | the line ends where the prior probability of a should stand",
                "pair p a b prior half | 'half' is not a number; write it like 0.25 or 1e-3",
                "pair p a b prior NaN | 'NaN' is not a number; write it like 0.25 or 1e-3",
                "pair p a b prior -0.1 | '-0.1' is not a number; write it like 0.25 or 1e-3",
                "pair p a b prior 0x1p-1 | '0x1p-1' is not a number; write it like 0.25 or 1e-3",
                "pair p a b prior 1.5 | '1.5' is not a probability; give a number between 0 and 1",
                "pair p a b prior 0.5 0.5 | '0.5' is left over at the end of the line",
                "pair p a c prior 0.5 | no state 'c' is named above this line; add a state line before it",
                "pair p A b prior 0.5 | no state 'A' is named above this line; add a state line before it",
                "pair q a b prior 0.5 | the name 'q' was already given in line 3 (upper and lower case count as the same); choose another",
                "channel Q a b | the name 'Q' was already given in line 3 (upper and lower case count as the same); choose another",
                "copies | the line ends where the name of a pair should stand",
                "copies x 1 2 | no pair 'x' is named above this line; add a pair line before it",
                "copies q | the line ends where a number of copies should stand",
                "copies q 0 | '0' is not a number of copies; give a whole number from 1 to 1000000",
                "copies q 1000001 | '1000001' is not a number of copies; give a whole number from 1 to 1000000",
                "copies q 1.5 | '1.5' is not a number of copies; give a whole number from 1 to 1000000",
                "copies q 5 5 | '5' does not exceed the value before it; give them in increasing order",
                "uses | the line ends where the name of a channel should stand",
                "uses q error 0.1 2 | no channel 'q' is named above this line; add a channel line before it",
                "ensemble e | an ensemble needs at least two states, this has 0",
                "ensemble e a:1 | an ensemble needs at least two states, this has 1",
                "ensemble e a b:1 | only 1 of 2 states have a prior; give STATE:PRIOR for all, or none for equal priors",
                "ensemble e :1 b:0 | no state '' is named above this line; add a state line before it",
                "ensemble e a:0.5 b: | '' is not a number; write it like 0.25 or 1e-3",
                "ensemble e a:0.5 b:0.4 | the priors sum to 0.9, expected 1; correct them, or give none for equal priors",
                "ensemble e a:0.33333333 b:0.66666666 | the priors sum to 0.99999999, expected 1; correct them, or give none"
                        + " for equal priors",
                "ensemble e a:0.5 c:0.5 | no state 'c' is named above this line; add a state line before it",
                "channel c a | a channel needs at least two letters, this has 1",
                "channel c a x | no state 'x' is named above this line; add a state line before it",
                "errors | the line ends where an error level should stand",
                "errors 0 | '0' is not an error level; give a number above 0 and below 1",
                "errors 1 | '1' is not an error level; give a number above 0 and below 1",
                "errors 0.2 0.1 | '0.1' does not exceed the value before it; give them in increasing order",
                "errors 0.1 0.1 | '0.1' does not exceed the value before it; give them in increasing order",
                "messages 1 | '1' is not a number of messages; give a whole number from 2 to 10^18",
                "messages 2.5 | '2.5' is not a number of messages; give a whole number from 2 to 10^18",
                "messages 99999999999999999999 | '99999999999999999999' is not a number of messages; give a whole number from 2 to 10^18",
                "output | the line ends where a directory should stand",
            })
    void aBadLineIsNamedWithItsCure(String line, String message) throws IOException {
        assertEquals(":4: " + message, refusal(TWO_STATES + "pair q a b prior 0.5\n" + line));
    }

    @ParameterizedTest
    @ValueSource(strings = {"title one", "errors 0.1", "messages 2", "output one"})
    void settingsAreGivenOnce(String line) throws IOException {
        String keyword = line.split(" ")[0];
        assertEquals(
                ":2: " + keyword + " was already given in line 1; keep one of the two", refusal(line + "\n" + line));
    }

    @Test
    void anEmptyFileSaysWhatIsMissing() throws IOException {
        assertEquals(": names no state; add a line such as 'state calm calm.mtx'", refusal(""));
        assertEquals(": names no state; add a line such as 'state calm calm.mtx'", refusal("# nothing\n\n"));
        assertEquals(": asks for nothing; add a pair, an ensemble or a channel line", refusal(TWO_STATES));
    }

    @Test
    void aHugeFileIsRefusedUnparsed() throws IOException {
        assertEquals(
                ": is longer than 1048576 bytes, so it is hardly a study file; name one",
                refusal("#".repeat(StudyText.MOST_BYTES + 1)));
        assertEquals(
                ": names no state; add a line such as 'state calm calm.mtx'",
                refusal("#".repeat(StudyText.MOST_BYTES)));
    }

    @Test
    void aBinaryFileIsRefusedWithTheByte() throws IOException {
        Path file = directory.resolve("x.study");
        Files.write(file, "title x\nstate \u00e4 b".getBytes(StandardCharsets.ISO_8859_1));
        assertEquals(
                file + ":2: byte 15 of the file is not UTF-8 text; save the file as UTF-8",
                assertThrows(BadInputException.class, () -> StudyParser.parse(file))
                        .getMessage());
    }

    @Test
    void aMissingFileAndADirectoryAreNamed() {
        Path missing = directory.resolve("none.study");
        assertEquals(
                missing + ": no such file; give the path of a study file",
                assertThrows(BadInputException.class, () -> StudyParser.parse(missing))
                        .getMessage());
        assertEquals(
                directory + ": is a directory; give the study file itself",
                assertThrows(BadInputException.class, () -> StudyParser.parse(directory))
                        .getMessage());
    }

    @Test
    void aMessageStaysOneShortLineWhateverTheFileHolds() throws IOException {
        String message = refusal("wei\u0000rd\u202e\u001b[31m" + "x".repeat(5000) + "\n");
        assertEquals(
                -1,
                message.chars()
                        .filter(c -> c < ' ' || c == '\u202e')
                        .findFirst()
                        .orElse(-1));
        assertEquals(true, message.length() < 300, message);
    }
}
