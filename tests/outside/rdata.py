"""Reads the data frames of an R workspace file, as far as the tests need.

The layout is that of "R Internals", section 1.8, Serialization Formats:
bzip2 around "RDX2\\nX\\n" and big-endian (XDR) items. Items that data frames
do not hold are refused. Data sets of a package stand in Rdata.rdb, one after
another, each with its size and the letter of its packing in front; Rdata.rdx
says where.
"""
import bz2
import lzma
import struct
import zlib

NILVALUE, SYMBOL, PAIRLIST = 254, 1, 2
CHARS, LOGICAL, INTEGER, REAL, STRINGS, LIST = 9, 10, 13, 14, 16, 19
REFERENCE = 255


class Reader:
    """Walks through a serialized stream; symbols are numbered as met."""

    def __init__(self, data):
        self.data = data
        self.at = 0
        self.symbols = []

    def take(self, form, count=1):
        size = struct.calcsize(form) * count
        values = struct.unpack_from(f">{count}{form}", self.data, self.at)
        self.at += size
        return values

    def integer(self):
        return self.take("i")[0]

    def header(self):
        magic, self.at = self.data[:7], 7
        if magic[:2] == b"X\n":  # a single object
            self.at = 2
        elif magic not in (b"RDX2\nX\n", b"RDX3\nX\n"):
            raise ValueError(f"no workspace of R: {magic!r}")
        version, _, _ = self.take("i", 3)
        if version == 3:
            self.take("s", self.integer())

    def pairs(self, flags):
        """A pairlist as a dictionary of its tagged values."""
        found = {}
        while flags & 0xFF == PAIRLIST:
            if flags & 0x200:
                self.item()
            tag = self.item() if flags & 0x400 else None
            found[tag] = self.item()
            flags = self.integer()
        if flags & 0xFF != NILVALUE:
            raise ValueError(f"a list ends with {flags & 0xFF}")
        return found

    def reference(self, flags):
        number = flags >> 8 or self.integer()
        return self.symbols[number - 1]

    def item(self):
        flags = self.integer()
        kind = flags & 0xFF
        if kind == NILVALUE:
            return None
        if kind == REFERENCE:
            return self.reference(flags)
        if kind == SYMBOL:
            self.symbols.append(self.item())
            return self.symbols[-1]
        if kind == PAIRLIST:
            return self.pairs(flags)
        if kind == CHARS:
            size = self.integer()
            if size < 0:
                return None
            self.at += size
            return self.data[self.at - size:self.at].decode("latin-1")
        value = self.vector(kind)
        attributes = self.pairs(self.integer()) if flags & 0x200 else {}
        return self.named(value, attributes)

    def vector(self, kind):
        count = self.integer()
        if kind in (INTEGER, LOGICAL):
            return list(self.take("i", count))
        if kind == REAL:
            return list(self.take("d", count))
        if kind in (STRINGS, LIST):
            return [self.item() for _ in range(count)]
        raise ValueError(f"an item of kind {kind} is not read")

    @staticmethod
    def named(value, attributes):
        if "levels" in attributes:
            return [attributes["levels"][code - 1] for code in value]
        if "names" in attributes:
            return dict(zip(attributes["names"], value))
        return value


def read(path):
    """The workspace's objects by name; data frames as {column: [values]}."""
    with open(path, "rb") as stream:
        reader = Reader(bz2.decompress(stream.read()))
    reader.header()
    return reader.item()


def _object(data):
    reader = Reader(data)
    reader.header()
    return reader.item()


def read_set(folder, name):
    """One data set of a package, as read() gives it."""
    index = _object(zlib.decompress((folder / "Rdata.rdx").read_bytes(),
                                    wbits=31))
    begin, size = index["variables"][name]
    packed = (folder / "Rdata.rdb").read_bytes()[begin:begin + size]
    if packed[4:5] != b"Z":
        raise ValueError(f"{name} is packed as {packed[4:5]!r}")
    filters = [{"id": lzma.FILTER_LZMA2, "preset": 6}]
    return _object(lzma.decompress(packed[5:], lzma.FORMAT_RAW, None, filters))
